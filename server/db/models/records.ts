import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import { instant, optionalInstant, string, uuidKey } from './columns';

/** A health record as issued; the database refuses to change what it says. */
export class HealthRecord extends Model<
  InferAttributes<HealthRecord>,
  InferCreationAttributes<HealthRecord>
> {
  declare id: CreationOptional<string>;
  declare bankId: string;
  declare tokenHash: string;
  /** Its content as the text the digest is of; null once its owner's account was deleted. */
  declare content: string | null;
  declare digest: string;
  declare issuedAt: Date;
  declare revokedAt: CreationOptional<Date | null>;
}

export function initRecordModels(sequelize: Sequelize): void {
  HealthRecord.init(
    {
      id: uuidKey(),
      bankId: string(),
      tokenHash: string(),
      content: { type: DataTypes.TEXT },
      digest: string(),
      issuedAt: instant(),
      revokedAt: optionalInstant(),
    },
    { sequelize, tableName: 'healthRecords', modelName: 'HealthRecord', timestamps: false },
  );
}
