import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import type { CheckFields, CheckState, Correction } from '@/lib/contract/checks';
import type { DecisionAction } from '@/lib/contract/moderation';
import type { LogCurve as LogCurveContent } from '../../moderation/curveLikeness';

import type { Check } from './checks';
import { instant, json, longText, optionalInstant, real, string, textKey, uuidKey, whole } from './columns';

/** A moderator at work on a check, until it expires. */
export class Claim extends Model<InferAttributes<Claim>, InferCreationAttributes<Claim>> {
  declare checkId: string;
  declare moderatorId: string;
  declare expiresAt: Date;
}

/** A check as it stood before a decision: what undoing brings back. */
export interface CheckBefore {
  state: CheckState;
  decidedAt: string | null;
  isRealFailure: boolean;
  correction: Correction | null;
  reading: CheckFields['reading'];
}

/** A decision on a check. Its mail and refit follow when the time to undo it is over. */
export class Decision extends Model<InferAttributes<Decision>, InferCreationAttributes<Decision>> {
  declare id: CreationOptional<string>;
  declare checkId: string;
  declare moderatorId: string;
  declare action: DecisionAction;
  /** Question or reason, as the owner gets it. */
  declare words: string;
  /** Of the check, after the decision. */
  declare version: number;
  declare before: CheckBefore;
  declare decidedAt: Date;
  declare takesEffectAt: Date;
  declare undoneAt: CreationOptional<Date | null>;
  declare check?: NonAttribute<Check>;
}

/** Turning away that waits for a second moderator. */
export class Proposal extends Model<InferAttributes<Proposal>, InferCreationAttributes<Proposal>> {
  declare checkId: string;
  declare moderatorId: string;
  declare reason: string;
  declare version: number;
  declare proposedAt: Date;
}

/** The curve of a log, to compare others with. */
export class LogCurve extends Model<InferAttributes<LogCurve>, InferCreationAttributes<LogCurve>> {
  declare uploadId: string;
  declare durationS: number;
  declare curve: LogCurveContent;
}

export function initModerationModels(sequelize: Sequelize): void {
  const plain = { sequelize, timestamps: false };
  Claim.init(
    { checkId: textKey(), moderatorId: string(), expiresAt: instant() },
    { ...plain, tableName: 'claims', modelName: 'Claim' },
  );
  Decision.init(
    {
      id: uuidKey(),
      checkId: string(),
      moderatorId: string(),
      action: string(),
      words: longText(),
      version: whole(),
      before: json(),
      decidedAt: instant(),
      takesEffectAt: instant(),
      undoneAt: optionalInstant(),
    },
    { ...plain, tableName: 'decisions', modelName: 'Decision' },
  );
  Proposal.init(
    {
      checkId: textKey(),
      moderatorId: string(),
      reason: longText(),
      version: whole(),
      proposedAt: instant(),
    },
    { ...plain, tableName: 'proposals', modelName: 'Proposal' },
  );
  LogCurve.init(
    { uploadId: textKey(), durationS: real(), curve: json() },
    { ...plain, tableName: 'logCurves', modelName: 'LogCurve' },
  );
}
