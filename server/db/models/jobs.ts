import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import {
  instant,
  json,
  longText,
  optionalInstant,
  optionalJson,
  optionalString,
  string,
  uuidKey,
  whole,
} from './columns';

export class Job extends Model<InferAttributes<Job>, InferCreationAttributes<Job>> {
  declare id: CreationOptional<string>;
  declare kind: string;
  declare payload: Record<string, unknown>;
  /** Queued jobs of one key are one job. */
  declare dedupeKey: string | null;
  declare state: 'queued' | 'running' | 'done' | 'failed';
  declare attempts: CreationOptional<number>;
  declare runAfter: Date;
  declare error: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

/** A mail, stored in the transaction that causes it and sent after. */
export class OutboxMail extends Model<InferAttributes<OutboxMail>, InferCreationAttributes<OutboxMail>> {
  declare id: CreationOptional<string>;
  declare recipient: string;
  declare subject: string;
  declare text: string;
  declare state: 'queued' | 'sent' | 'failed';
  /** Mails of one key are sent once. */
  declare onceKey: CreationOptional<string | null>;
  /** Mail headers beyond the usual ones. */
  declare headers: CreationOptional<Record<string, string> | null>;
  /** Whose mail it is, where that is an account's: it goes when the account goes. */
  declare userId: CreationOptional<string | null>;
  /** Why it could not be handed over, at the last try. */
  declare problem: CreationOptional<string | null>;
  declare sentAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initJobModels(sequelize: Sequelize): void {
  Job.init(
    {
      id: uuidKey(),
      kind: string(),
      payload: json(),
      dedupeKey: optionalString(),
      state: string(),
      attempts: whole(0),
      runAfter: instant(),
      error: optionalString(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'jobs', modelName: 'Job' },
  );
  OutboxMail.init(
    {
      id: uuidKey(),
      recipient: string(),
      subject: string(),
      text: longText(),
      state: string(),
      onceKey: optionalString(),
      headers: optionalJson(),
      userId: optionalString(),
      problem: optionalString(),
      sentAt: optionalInstant(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'outbox', modelName: 'OutboxMail', updatedAt: false },
  );
}
