import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';

import type { Verdict } from '@/lib/contract/agreement';

import type { Check } from './checks';
import { instant, longText, optionalInstant, optionalString, string, uuidKey } from './columns';
import type { Decision } from './moderation';

/** A decision that a second moderator looks at without knowing it. */
export class BlindReview extends Model<InferAttributes<BlindReview>, InferCreationAttributes<BlindReview>> {
  declare id: CreationOptional<string>;
  declare checkId: string;
  declare decisionId: string;
  /** Null until there is a moderator who may. */
  declare reviewerId: string | null;
  declare drawnAt: Date;
  declare verdict: CreationOptional<Verdict | null>;
  declare words: CreationOptional<string>;
  declare doneAt: CreationOptional<Date | null>;
  declare check?: NonAttribute<Check>;
  declare decision?: NonAttribute<Decision>;
}

export function initBlindReviewModels(sequelize: Sequelize): void {
  BlindReview.init(
    {
      id: uuidKey(),
      checkId: string(),
      decisionId: string(),
      reviewerId: optionalString(),
      drawnAt: instant(),
      verdict: optionalString(),
      words: { ...longText(), defaultValue: '' },
      doneAt: optionalInstant(),
    },
    { sequelize, tableName: 'blindReviews', modelName: 'BlindReview', timestamps: false },
  );
}
