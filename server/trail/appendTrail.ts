import { createHash } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { TrailEntry } from '../db/models';
import type { SignedInActor } from '../policies';

interface TrailRequest {
  /** Who did it; 'system' for jobs. */
  actor: Pick<SignedInActor, 'userId' | 'role'> | 'system';
  at: Date;
  subjectType: 'check' | 'bank' | 'account' | 'cellType' | 'pool';
  subjectId: string;
  action: string;
  details: Record<string, unknown>;
}

/**
 * Appends to the trail in the caller's transaction. Each entry's hash covers its content and the hash before it; the
 * write lock of the transaction keeps two writers from taking the same predecessor.
 */
export async function appendTrail(request: TrailRequest, transaction: Transaction): Promise<TrailEntry> {
  const last = await TrailEntry.findOne({ order: [['id', 'DESC']], attributes: ['hash'], transaction });
  const content = {
    at: request.at,
    actorId: request.actor === 'system' ? null : request.actor.userId,
    actorRole: request.actor === 'system' ? ('system' as const) : request.actor.role,
    subjectType: request.subjectType,
    subjectId: request.subjectId,
    action: request.action,
    details: request.details,
  };
  const previousHash = last?.hash ?? '';
  return TrailEntry.create(
    { ...content, previousHash, hash: trailHash(content, previousHash) },
    { transaction },
  );
}

/** SHA-256 over the previous hash and the entry's content as JSON. */
export function trailHash(content: object, previousHash: string): string {
  return createHash('sha256').update(previousHash).update(JSON.stringify(content)).digest('hex');
}
