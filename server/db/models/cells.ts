import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import {
  instant,
  optionalInstant,
  optionalReal,
  optionalString,
  real,
  string,
  textKey,
  uuidKey,
  whole,
} from './columns';

export class CellType extends Model<InferAttributes<CellType>, InferCreationAttributes<CellType>> {
  /** Readable key, as in addresses. */
  declare id: string;
  declare maker: string;
  declare name: string;
  declare format: 'prismatic' | 'cylindrical' | 'pouch';
  declare ratedAh: number;
  declare nominalV: number;
  declare faceAreaMm2: CreationOptional<number | null>;
  declare massKg: CreationOptional<number | null>;
  declare status: 'proposed' | 'listed';
  declare proposedById: CreationOptional<string | null>;
  /** As its proposer typed it, where `name` had to be told apart from another's proposal. */
  declare proposedName: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  /** What became of one that left the catalogue; its status is then 'proposed'. */
  declare closedAs: CreationOptional<'declined' | 'merged' | null>;
  declare closedAt: CreationOptional<Date | null>;
  /** The cell type that it turned out to be. */
  declare mergedIntoId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare claims?: NonAttribute<QuotedClaim[]>;
}

/** A data-sheet claim; null where the sheet does not state a condition. */
export class QuotedClaim extends Model<InferAttributes<QuotedClaim>, InferCreationAttributes<QuotedClaim>> {
  declare id: CreationOptional<string>;
  declare cellTypeId: string;
  declare cycles: number;
  declare endOfLifeFraction: number;
  declare depthFraction: number | null;
  declare chargeIt: number | null;
  declare dischargeIt: number | null;
  declare temperatureC: number | null;
  declare clamping: 'clamped' | 'none' | 'notStated';
  declare clampForceN: number | null;
  declare whereItStands: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

export function initCellModels(sequelize: Sequelize): void {
  CellType.init(
    {
      id: textKey(),
      maker: string(),
      name: string(),
      format: string(),
      ratedAh: real(),
      nominalV: real(),
      faceAreaMm2: optionalReal(),
      massKg: optionalReal(),
      status: string(),
      proposedById: optionalString(),
      proposedName: optionalString(),
      version: whole(1),
      closedAs: optionalString(),
      closedAt: optionalInstant(),
      mergedIntoId: optionalString(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'cellTypes', modelName: 'CellType' },
  );
  QuotedClaim.init(
    {
      id: uuidKey(),
      cellTypeId: string(),
      cycles: whole(),
      endOfLifeFraction: real(),
      depthFraction: optionalReal(),
      chargeIt: optionalReal(),
      dischargeIt: optionalReal(),
      temperatureC: optionalReal(),
      clamping: string(),
      clampForceN: optionalReal(),
      whereItStands: string(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'quotedClaims', modelName: 'QuotedClaim' },
  );
}
