import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import type { CheckFields, CheckState, Computed, Correction } from '@/lib/contract/checks';
import type { LogResult, RecognisedLog, Upload as UploadContract } from '@/lib/contract/uploads';

import type { Bank } from './banks';
import {
  instant,
  json,
  longText,
  optionalInstant,
  optionalJson,
  optionalString,
  optionalWhole,
  real,
  string,
  uuidKey,
  whole,
  yesNo,
} from './columns';

/** Severities as stored, so that a queue can be sorted by them: the place in this list. */
export const severityOrder = ['fits', 'look', 'doubtful', 'repairable'] as const;

export class Check extends Model<InferAttributes<Check>, InferCreationAttributes<Check>> {
  declare id: CreationOptional<string>;
  declare bankId: string;
  declare state: CheckState;
  declare version: CreationOptional<number>;
  declare idempotencyKey: string;
  declare testedOn: string;
  declare reading: CheckFields['reading'];
  declare conditions: CheckFields['conditions'];
  declare sources: CheckFields['sources'];
  declare note: string;
  declare uploadId: string | null;
  declare photoId: CreationOptional<string | null>;
  declare computed: Computed;
  declare ageYears: number;
  declare efc: number;
  declare sohFraction: number;
  /** Worst finding, an index into severityOrder. */
  declare severity: number;
  declare submittedAt: Date;
  declare decidedAt: CreationOptional<Date | null>;
  /** Figures a moderator put right, with the owner's own beside them. */
  declare correction: CreationOptional<Correction | null>;
  /** Kept and counted, whatever the screening says of it. */
  declare isRealFailure: CreationOptional<boolean>;
  /** The check of the same test that this one was merged into. */
  declare mergedIntoId: CreationOptional<string | null>;
  /** Version of the data licence its owner agreed to; null for checks from before it was asked. */
  declare consentVersion: CreationOptional<number | null>;
  /** SHA-256 of the file of earlier checks it came in with; null for one that was sent by itself. */
  declare fileDigest: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare bank?: NonAttribute<Bank>;
  declare findings?: NonAttribute<Finding[]>;
  declare upload?: NonAttribute<Upload | null>;
}

export class Finding extends Model<InferAttributes<Finding>, InferCreationAttributes<Finding>> {
  declare id: CreationOptional<string>;
  declare checkId: string;
  declare rule: string;
  declare title: string;
  declare severity: number;
  declare ownerText: string;
  declare moderatorText: string;
  declare evidence: Record<string, number | string>;
  declare createdAt: CreationOptional<Date>;
}

/** A further file of a log that was split; the first stands in the row itself. */
export interface LogPart {
  filename: string;
  storageKey: string;
  sha256: string;
  bytes: number;
}

export class Upload extends Model<InferAttributes<Upload>, InferCreationAttributes<Upload>> {
  declare id: CreationOptional<string>;
  declare ownerId: string;
  declare bankId: string;
  declare kind: 'log' | 'photo';
  declare filename: string;
  declare storageKey: string;
  /** Of a photo: its small twin. */
  declare thumbKey: CreationOptional<string | null>;
  /** Of what was sent; of a photo that is not what is kept. */
  declare sha256: string;
  declare bytes: number;
  declare state: UploadContract['state'];
  declare progressFraction: CreationOptional<number>;
  declare recognised: CreationOptional<RecognisedLog | null>;
  declare result: CreationOptional<LogResult | null>;
  declare problem: CreationOptional<string | null>;
  /** Of a log: its further files. */
  declare parts: CreationOptional<LogPart[] | null>;
  /** Of a log: its owner matched its columns, which later logs with the same header are read by. */
  declare isMatched: CreationOptional<boolean>;
  declare width: CreationOptional<number | null>;
  declare height: CreationOptional<number | null>;
  /** Of a photo: pictures that look alike differ in few of its 64 bits. */
  declare perceptualHash: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

export function initCheckModels(sequelize: Sequelize): void {
  Check.init(
    {
      id: uuidKey(),
      bankId: string(),
      state: string(),
      version: whole(1),
      idempotencyKey: string(),
      testedOn: string(),
      reading: json(),
      conditions: json(),
      sources: json(),
      note: longText(),
      uploadId: optionalString(),
      photoId: optionalString(),
      computed: json(),
      ageYears: real(),
      efc: real(),
      sohFraction: real(),
      severity: whole(),
      submittedAt: instant(),
      decidedAt: optionalInstant(),
      correction: optionalJson(),
      isRealFailure: yesNo(false),
      mergedIntoId: optionalString(),
      consentVersion: optionalWhole(),
      fileDigest: optionalString(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'checks', modelName: 'Check' },
  );
  Finding.init(
    {
      id: uuidKey(),
      checkId: string(),
      rule: string(),
      title: string(),
      severity: whole(),
      ownerText: longText(),
      moderatorText: longText(),
      evidence: json(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'findings', modelName: 'Finding', updatedAt: false },
  );
  Upload.init(
    {
      id: uuidKey(),
      ownerId: string(),
      bankId: string(),
      kind: string(),
      filename: string(),
      storageKey: string(),
      thumbKey: optionalString(),
      sha256: string(),
      bytes: whole(),
      state: string(),
      progressFraction: real(0),
      recognised: optionalJson(),
      result: optionalJson(),
      problem: optionalString(),
      parts: optionalJson(),
      isMatched: yesNo(false),
      width: optionalWhole(),
      height: optionalWhole(),
      perceptualHash: optionalString(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'uploads', modelName: 'Upload' },
  );
}
