import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

import type { Role } from '@/lib/contract/accounts';

import { instant, optionalInstant, string, uuidKey, yesNo } from './columns';

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare passwordHash: string;
  declare role: Role;
  declare emailVerifiedAt: CreationOptional<Date | null>;
  /** Which mails beyond those an account needs its owner wants. */
  declare noticeReminders: CreationOptional<boolean>;
  declare noticeDecisions: CreationOptional<boolean>;
  declare noticeReleases: CreationOptional<boolean>;
  /** Set once its owner deleted the account: the row stands for one owner, and holds nothing of them. */
  declare erasedAt: CreationOptional<Date | null>;
  /** Set while a steward keeps the account from signing in. */
  declare lockedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

/** One refresh token; the tokens of one sign-in form a family. */
export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: CreationOptional<string>;
  declare familyId: string;
  declare userId: string;
  declare tokenHash: string;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;
  declare revokedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export type TokenPurpose = 'verify' | 'reset';

export class OneTimeToken extends Model<
  InferAttributes<OneTimeToken>,
  InferCreationAttributes<OneTimeToken>
> {
  declare id: CreationOptional<string>;
  declare userId: string;
  declare purpose: TokenPurpose;
  declare tokenHash: string;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

/** An address an account is to move to, once its link has been opened. */
export class AddressChange extends Model<
  InferAttributes<AddressChange>,
  InferCreationAttributes<AddressChange>
> {
  declare id: CreationOptional<string>;
  declare userId: string;
  declare email: string;
  declare tokenHash: string;
  declare expiresAt: Date;
  declare createdAt: CreationOptional<Date>;
}

export function initAccountModels(sequelize: Sequelize): void {
  User.init(
    {
      id: uuidKey(),
      email: string(),
      passwordHash: string(),
      role: string(),
      emailVerifiedAt: optionalInstant(),
      noticeReminders: yesNo(true),
      noticeDecisions: yesNo(true),
      noticeReleases: yesNo(false),
      erasedAt: optionalInstant(),
      lockedAt: optionalInstant(),
      createdAt: instant(),
      updatedAt: instant(),
    },
    { sequelize, tableName: 'users', modelName: 'User' },
  );
  Session.init(
    {
      id: uuidKey(),
      familyId: string(),
      userId: string(),
      tokenHash: string(),
      expiresAt: instant(),
      usedAt: optionalInstant(),
      revokedAt: optionalInstant(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'sessions', modelName: 'Session', updatedAt: false },
  );
  OneTimeToken.init(
    {
      id: uuidKey(),
      userId: string(),
      purpose: string(),
      tokenHash: string(),
      expiresAt: instant(),
      usedAt: optionalInstant(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'oneTimeTokens', modelName: 'OneTimeToken', updatedAt: false },
  );
  AddressChange.init(
    {
      id: uuidKey(),
      userId: string(),
      email: string(),
      tokenHash: string(),
      expiresAt: instant(),
      createdAt: instant(),
    },
    { sequelize, tableName: 'addressChanges', modelName: 'AddressChange', updatedAt: false },
  );
}
