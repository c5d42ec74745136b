import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import type { ReleaseChanges, ReleaseFigures } from '@/lib/contract/releases';
import type { BankIdentity } from '../../publicView/identity';
import type { PublicCheck } from '../../publicView/bankRows';

import { countingKey, instant, json, longText, string, textKey, whole } from './columns';

/** A numbered state of the public pool with its fit; the database refuses to change it. */
export class Release extends Model<InferAttributes<Release>, InferCreationAttributes<Release>> {
  declare number: CreationOptional<number>;
  declare publishedOn: string;
  declare note: string;
  declare codeVersion: string;
  declare owners: number;
  declare banks: number;
  declare checks: number;
  /** Of checks.csv. */
  declare dataSha256: string;
  declare figures: ReleaseFigures;
  declare changes: ReleaseChanges;
  declare createdAt: CreationOptional<Date>;
}

export class ReleaseFile extends Model<InferAttributes<ReleaseFile>, InferCreationAttributes<ReleaseFile>> {
  declare number: number;
  declare name: string;
  declare storageKey: string;
  declare type: string;
  declare bytes: number;
  declare sha256: string;
}

/** Which bank stands in a release under which name. No route reads it: it links names to banks. */
export class ReleaseBank extends Model<InferAttributes<ReleaseBank>, InferCreationAttributes<ReleaseBank>> {
  declare number: number;
  declare pseudonym: string;
  declare bankId: string;
  declare ownerId: string;
  declare identity: BankIdentity;
  declare level: number;
  /** As published. */
  declare rows: PublicCheck[];
}

export function initReleaseModels(sequelize: Sequelize): void {
  const numbered = { ...whole(), primaryKey: true };
  Release.init(
    {
      number: countingKey(),
      publishedOn: string(),
      note: longText(),
      codeVersion: string(),
      owners: whole(),
      banks: whole(),
      checks: whole(),
      dataSha256: string(),
      figures: json(),
      changes: json(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'releases', modelName: 'Release', updatedAt: false },
  );
  ReleaseFile.init(
    {
      number: numbered,
      name: textKey(),
      storageKey: string(),
      type: string(),
      bytes: whole(),
      sha256: string(),
    },
    { sequelize, tableName: 'releaseFiles', modelName: 'ReleaseFile', timestamps: false },
  );
  ReleaseBank.init(
    {
      number: { ...whole(), primaryKey: true },
      pseudonym: textKey(),
      bankId: string(),
      ownerId: string(),
      identity: json(),
      level: whole(),
      rows: json(),
    },
    { sequelize, tableName: 'releaseBanks', modelName: 'ReleaseBank', timestamps: false },
  );
}
