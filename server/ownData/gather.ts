import { bankFieldsSchema } from '@/lib/contract/banks';

import { findBanksOf, type LoadedBank } from '../banks/queries';
import { presentCellTypeBrief } from '../cellTypes/present';
import { findProposalsOf } from '../cellTypes/queries';
import { fieldsOf } from '../checks/evaluateCheck';
import { presentHistory } from '../checks/presentHistory';
import { findChecksOf, findTrailOf, type LoadedCheck } from '../checks/queries';
import { HealthRecord, Reminder, type TrailEntry, Upload, User } from '../db/models';
import { noticeChoiceOf } from '../mail/notices';

/** A check as its owner is given it: everything they entered, what was computed from it, and what was done with it. */
export function exportedCheck(check: LoadedCheck, trail: readonly TrailEntry[]) {
  return {
    id: check.id,
    state: check.state,
    version: check.version,
    submittedAt: check.submittedAt.toISOString(),
    decidedAt: check.decidedAt?.toISOString() ?? null,
    consentVersion: check.consentVersion,
    ...fieldsOf(check),
    computed: check.computed,
    findings: check.findings.map(({ rule, title, ownerText }) => ({ rule, title, text: ownerText })),
    trail: exportedTrail(trail),
  };
}

/** What the owner entered stands whole beside its step; of what others did, what the owner was told. */
function exportedTrail(trail: readonly TrailEntry[]) {
  return presentHistory(trail).map((message, place) => {
    const { details, texts = [] } = trail[place]!;
    const words = Object.fromEntries(texts.map(({ field, text }) => [field, text]));
    const { textDigests: _digests, ...entered } = details;
    return message.by === 'owner' ? { ...message, details: { ...entered, ...words } } : message;
  });
}

async function exportedBank(bank: LoadedBank) {
  const checks = await findChecksOf(bank.id);
  const trail = await findTrailOf(checks.map(({ id }) => id));
  const uploads = await Upload.findAll({ where: { bankId: bank.id }, order: [['createdAt', 'ASC']] });
  const reminder = await Reminder.findByPk(bank.id);
  const records = await HealthRecord.findAll({ where: { bankId: bank.id }, order: [['issuedAt', 'ASC']] });
  return {
    id: bank.id,
    createdAt: bank.createdAt.toISOString(),
    ...bankFieldsSchema.parse(bank.get()),
    cellType: presentCellTypeBrief(bank.cellType),
    events: bank.events.map(({ id, happenedOn, kind, note }) => ({ id, happenedOn, kind, note })),
    reminder: reminder && { isOn: reminder.isOn, dueOn: reminder.dueOn },
    uploads: uploads.map(({ id, kind, filename, bytes, sha256, state, createdAt }) => ({
      ...{ id, kind, filename, bytes, sha256, state },
      createdAt: createdAt.toISOString(),
    })),
    healthRecords: records.map(({ id, issuedAt, revokedAt, digest, content }) => ({
      ...{ id, digest, issuedAt: issuedAt.toISOString(), withdrawnAt: revokedAt?.toISOString() ?? null },
      content: content === null ? null : (JSON.parse(content) as unknown),
    })),
    checks: checks.map((check) => exportedCheck(check, trail.get(check.id) ?? [])),
  };
}

/** Everything the exchange keeps about an account, apart from its password's hash and its sign-ins. */
export async function gatherOwnData(userId: string, exportedAt: Date) {
  const user = await User.findByPk(userId, { rejectOnEmpty: true });
  const banks = [];
  for (const bank of await findBanksOf(userId)) banks.push(await exportedBank(bank));
  return {
    about: 'Own data of an account at Ebbline. Quantities are SI units plus Ah and Wh; fractions are 0 to 1.',
    exportedAt: exportedAt.toISOString(),
    account: {
      id: user.id,
      email: user.email,
      role: user.role,
      createdAt: user.createdAt.toISOString(),
      notices: noticeChoiceOf(user),
    },
    banks,
    cellTypesProposed: (await findProposalsOf(userId)).map((cellType) => ({
      ...presentCellTypeBrief(cellType),
      format: cellType.format,
      faceAreaMm2: cellType.faceAreaMm2,
      massKg: cellType.massKg,
      isListed: cellType.status === 'listed',
      proposedAt: cellType.createdAt.toISOString(),
    })),
  };
}
