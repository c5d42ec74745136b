import type { Sequelize } from 'sequelize';

import { initAccountModels } from './accounts';
import { Bank, BankEvent, initBankModels, Reminder } from './banks';
import { BlindReview, initBlindReviewModels } from './blindReviews';
import { CellType, initCellModels, QuotedClaim } from './cells';
import { Check, Finding, initCheckModels, Upload } from './checks';
import { initJobModels } from './jobs';
import { Decision, initModerationModels } from './moderation';
import { HealthRecord, initRecordModels } from './records';
import { initReleaseModels } from './releases';
import { initPoolModels, PublicMember, TrailEntry, TrailText } from './pool';
import { initSecondFactorModels } from './secondFactor';
import { initStewardModels } from './steward';

export { AddressChange, OneTimeToken, Session, type TokenPurpose, User } from './accounts';
export { Bank, BankEvent, Reminder } from './banks';
export { BlindReview } from './blindReviews';
export { CellType, QuotedClaim } from './cells';
export { Check, Finding, type LogPart, severityOrder, Upload } from './checks';
export { Job, OutboxMail } from './jobs';
export { type CheckBefore, Claim, Decision, LogCurve, Proposal } from './moderation';
export { HealthRecord } from './records';
export { Release, ReleaseBank, ReleaseFile } from './releases';
export { CurrentFit, Fit, type FitKind, PoolStep, PublicMember, TrailEntry, TrailText } from './pool';
export { RecoveryCode, SecondFactor } from './secondFactor';
export { TrailCheck } from './steward';

/** Binds every model and association to the connection. */
export function initModels(sequelize: Sequelize): void {
  initAccountModels(sequelize);
  initCellModels(sequelize);
  initBankModels(sequelize);
  initCheckModels(sequelize);
  initPoolModels(sequelize);
  initJobModels(sequelize);
  initModerationModels(sequelize);
  initSecondFactorModels(sequelize);
  initStewardModels(sequelize);
  initRecordModels(sequelize);
  initBlindReviewModels(sequelize);
  initReleaseModels(sequelize);

  CellType.hasMany(QuotedClaim, { as: 'claims', foreignKey: 'cellTypeId' });
  Bank.belongsTo(CellType, { as: 'cellType', foreignKey: 'cellTypeId' });
  Bank.hasMany(BankEvent, { as: 'events', foreignKey: 'bankId' });
  Bank.hasOne(Reminder, { as: 'reminder', foreignKey: 'bankId' });
  Bank.hasMany(Check, { as: 'checks', foreignKey: 'bankId' });
  Check.belongsTo(Bank, { as: 'bank', foreignKey: 'bankId' });
  Check.belongsTo(Upload, { as: 'upload', foreignKey: 'uploadId' });
  Decision.belongsTo(Check, { as: 'check', foreignKey: 'checkId' });
  Check.hasMany(Finding, { as: 'findings', foreignKey: 'checkId' });
  HealthRecord.belongsTo(Bank, { as: 'bank', foreignKey: 'bankId' });
  BlindReview.belongsTo(Check, { as: 'check', foreignKey: 'checkId' });
  BlindReview.belongsTo(Decision, { as: 'decision', foreignKey: 'decisionId' });
  TrailEntry.hasMany(TrailText, { as: 'texts', foreignKey: 'trailId' });
  PublicMember.belongsTo(Check, { as: 'check', foreignKey: 'checkId' });
  Check.hasOne(PublicMember, { as: 'member', foreignKey: 'checkId' });
}
