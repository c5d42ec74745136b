import { createHash } from 'node:crypto';

import { drawToken, hashToken } from '../accounts/secretTokens';
import { findOwnBank } from '../banks/queries';
import { Check, HealthRecord } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { findWorkingPool } from '../moderation/workingPool';
import type { SignedInActor } from '../policies';
import { findStanding } from '../standing/findStanding';
import { appendTrail } from '../trail/appendTrail';
import { recordContent } from './recordContent';

/**
 * Issues a health record of the actor's bank, as of now. Its token is told once: only the token's hash is stored, so
 * that nobody who reads the database can open a record; who lost the link issues another.
 * @throws AppError conflict without an approved check
 */
export async function issueRecord(
  deps: Deps,
  actor: SignedInActor,
  bankId: string,
): Promise<{ record: HealthRecord; token: string }> {
  const bank = await findOwnBank(actor, 'records.create', bankId);
  const standing = await findStanding(deps, bank);
  const setAside = (await findWorkingPool(deps))?.setAside ?? new Set<string>();
  return deps.db.transaction(async (transaction) => {
    const checks = await Check.findAll({
      where: { bankId, state: 'approved' },
      order: [
        ['testedOn', 'ASC'],
        ['id', 'ASC'],
      ],
      transaction,
    });
    if (checks.length === 0)
      throw new AppError('conflict', 'A health record rests on approved checks, and this bank has none yet.');
    const issuedAt = deps.clock();
    const content = JSON.stringify(recordContent(bank, { checks, setAside, standing, now: issuedAt }));
    const digest = digestOf(content);
    const token = drawToken();
    const record = await HealthRecord.create(
      { bankId, tokenHash: hashToken(token), content, digest, issuedAt },
      { transaction },
    );
    const entry = {
      actor,
      at: issuedAt,
      subjectType: 'bank',
      subjectId: bankId,
      action: 'recordIssued',
    } as const;
    await appendTrail({ ...entry, details: { recordId: record.id, digest } }, transaction);
    return { record, token };
  });
}

/** SHA-256 over a record's content as stored. */
export const digestOf = (content: string) => createHash('sha256').update(content).digest('hex');
