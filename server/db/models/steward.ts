import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import { countingKey, instant, json, longText, real, whole } from './columns';

/** What one walk along the trail found. */
export class TrailCheck extends Model<InferAttributes<TrailCheck>, InferCreationAttributes<TrailCheck>> {
  declare id: CreationOptional<number>;
  declare entries: number;
  /** Of the last entry then: a trail whose end was cut off has it no more. */
  declare lastHash: string;
  declare problems: { id: number; problem: string }[];
  declare durationMs: number;
  declare checkedAt: Date;
}

export function initStewardModels(sequelize: Sequelize): void {
  TrailCheck.init(
    {
      id: countingKey(),
      entries: whole(),
      lastHash: longText(),
      problems: json(),
      durationMs: real(),
      checkedAt: instant(),
    },
    { sequelize, tableName: 'trailChecks', modelName: 'TrailCheck', timestamps: false },
  );
}
