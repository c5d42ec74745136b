import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import { instant, longText, optionalInstant, optionalWhole, textKey, whole } from './columns';

/** The second step of an account's sign-in: it counts once a code has confirmed it. */
export class SecondFactor extends Model<
  InferAttributes<SecondFactor>,
  InferCreationAttributes<SecondFactor>
> {
  declare userId: string;
  /** The secret shared with the app that makes the codes, encrypted. */
  declare sealedSecret: string;
  declare confirmedAt: CreationOptional<Date | null>;
  /** Time step of the last code taken: neither it nor an earlier one is taken again. */
  declare lastStep: CreationOptional<number | null>;
  /** Wrong codes since the last right one. */
  declare failures: CreationOptional<number>;
  /** After too many of them no code is looked at until then. */
  declare closedUntil: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** A code for when the app is out of reach, by its keyed hash. */
export class RecoveryCode extends Model<
  InferAttributes<RecoveryCode>,
  InferCreationAttributes<RecoveryCode>
> {
  declare userId: string;
  declare codeHash: string;
  declare usedAt: CreationOptional<Date | null>;
}

export function initSecondFactorModels(sequelize: Sequelize): void {
  SecondFactor.init(
    {
      userId: textKey(),
      sealedSecret: longText(),
      confirmedAt: optionalInstant(),
      lastStep: optionalWhole(),
      failures: whole(0),
      closedUntil: optionalInstant(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'secondFactors', modelName: 'SecondFactor', updatedAt: false },
  );
  RecoveryCode.init(
    { userId: textKey(), codeHash: textKey(), usedAt: optionalInstant() },
    { sequelize, tableName: 'recoveryCodes', modelName: 'RecoveryCode', timestamps: false },
  );
}
