import {
  type HealthRecord as RecordContract,
  recordContentSchema,
  type SharedRecord,
} from '@/lib/contract/records';

import type { HealthRecord } from '../db/models';
import { digestOf } from './issueRecord';

const shownDigits = 12;

/** A record as its owner lists it; what it says is behind its link. */
export const presentRecord = ({ id, issuedAt, digest, revokedAt }: HealthRecord): RecordContract => ({
  ...{ id, digest: digest.slice(0, shownDigits), issuedAt: issuedAt.toISOString() },
  withdrawnAt: revokedAt?.toISOString() ?? null,
});

/** A record for anyone with its link: as issued, or that it was withdrawn and nothing else. */
export function presentShared(record: HealthRecord): SharedRecord {
  const { content, digest, issuedAt, revokedAt } = record;
  if (revokedAt !== null || content === null) return { state: 'withdrawn' };
  if (digestOf(content) !== digest) throw new Error(`health record ${record.id} is not as it was issued`);
  return {
    state: 'inForce',
    ...{ issuedAt: issuedAt.toISOString(), digest: digest.slice(0, shownDigits) },
    content: recordContentSchema.parse(JSON.parse(content)),
  };
}
