import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { BankIdentity } from '../../publicView/identity';

import {
  countingKey,
  instant,
  json,
  longText,
  optionalJson,
  optionalString,
  real,
  string,
  textKey,
  uuidKey,
  whole,
  yesNo,
} from './columns';

/** One move of the public pool: at least five owners' changes at once. */
export class PoolStep extends Model<InferAttributes<PoolStep>, InferCreationAttributes<PoolStep>> {
  declare id: CreationOptional<number>;
  declare owners: number;
  declare added: number;
  declare removed: number;
  declare createdAt: CreationOptional<Date>;
}

/** A check in the public pool, with its row as it stood when it entered. */
export class PublicMember extends Model<
  InferAttributes<PublicMember>,
  InferCreationAttributes<PublicMember>
> {
  declare checkId: string;
  declare stepId: number;
  declare row: PoolCheck;
  /** Of the bank, as it stood then. */
  declare identity: BankIdentity;
  /** How far it is generalised in public. */
  declare level: number;
}

export type FitKind = 'working' | 'public';

/** One run of the fit; the database refuses to change it. */
export class Fit extends Model<InferAttributes<Fit>, InferCreationAttributes<Fit>> {
  declare id: CreationOptional<string>;
  declare kind: FitKind;
  declare trigger: string;
  declare isGood: boolean;
  declare reason: string | null;
  declare dataHash: string;
  declare codeVersion: string;
  declare owners: number;
  declare banks: number;
  declare checks: number;
  declare parameters: unknown;
  declare covariance: unknown;
  declare diagnostics: unknown;
  declare curves: unknown;
  declare durationMs: number;
  declare createdAt: CreationOptional<Date>;
}

/** Points at the good fit in force, one per kind. */
export class CurrentFit extends Model<InferAttributes<CurrentFit>, InferCreationAttributes<CurrentFit>> {
  declare kind: FitKind;
  declare fitId: string;
}

/** One entry of the append-only trail, chained to the one before by its hash. */
export class TrailEntry extends Model<InferAttributes<TrailEntry>, InferCreationAttributes<TrailEntry>> {
  declare id: CreationOptional<number>;
  declare at: Date;
  declare actorId: string | null;
  declare actorRole: 'owner' | 'moderator' | 'steward' | 'system';
  declare subjectType: string;
  declare subjectId: string;
  declare action: string;
  declare details: Record<string, unknown>;
  declare previousHash: string;
  declare hash: string;

  declare texts?: NonAttribute<TrailText[]>;
}

/** Words of a person behind an entry of the trail. The entry holds their digest, so that they can be erased. */
export class TrailText extends Model<InferAttributes<TrailText>, InferCreationAttributes<TrailText>> {
  declare trailId: number;
  declare field: string;
  declare salt: string;
  declare text: string;
}

export function initPoolModels(sequelize: Sequelize): void {
  PoolStep.init(
    { id: countingKey(), owners: whole(), added: whole(), removed: whole(), createdAt: instant() },
    { sequelize, tableName: 'poolSteps', modelName: 'PoolStep', updatedAt: false },
  );
  PublicMember.init(
    { checkId: textKey(), stepId: whole(), row: json(), identity: json(), level: whole() },
    { sequelize, tableName: 'publicMembers', modelName: 'PublicMember', timestamps: false },
  );
  Fit.init(
    {
      id: uuidKey(),
      kind: string(),
      trigger: string(),
      isGood: yesNo(),
      reason: optionalString(),
      dataHash: string(),
      codeVersion: string(),
      owners: whole(),
      banks: whole(),
      checks: whole(),
      parameters: optionalJson(),
      covariance: optionalJson(),
      diagnostics: optionalJson(),
      curves: optionalJson(),
      durationMs: real(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'fits', modelName: 'Fit', updatedAt: false },
  );
  CurrentFit.init(
    { kind: textKey(), fitId: string() },
    { sequelize, tableName: 'currentFits', modelName: 'CurrentFit', timestamps: false },
  );
  TrailEntry.init(
    {
      id: countingKey(),
      at: instant(),
      actorId: optionalString(),
      actorRole: string(),
      subjectType: string(),
      subjectId: string(),
      action: string(),
      details: json(),
      previousHash: string(),
      hash: longText(),
    },
    { sequelize, tableName: 'trail', modelName: 'TrailEntry', timestamps: false },
  );
  TrailText.init(
    {
      trailId: { ...whole(), primaryKey: true },
      field: textKey(),
      salt: string(),
      text: longText(),
    },
    { sequelize, tableName: 'trailTexts', modelName: 'TrailText', timestamps: false },
  );
}
