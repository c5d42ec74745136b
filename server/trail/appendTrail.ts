import { createHash, randomBytes } from 'node:crypto';

import type { Transaction } from 'sequelize';

import type { TrailKind } from '@/lib/contract/steward';

import { TrailEntry, TrailText } from '../db/models';
import type { SignedInActor } from '../policies';

interface TrailRequest {
  /** Who did it; 'system' for jobs. */
  actor: Pick<SignedInActor, 'userId' | 'role'> | 'system';
  at: Date;
  subjectType: TrailKind;
  subjectId: string;
  action: string;
  details: Record<string, unknown>;
  /**
   * What a person wrote in their own words: kept beside the entry, so that it can be erased with their account. The
   * entry holds its salted digest, which still proves the words while they are there and tells nothing afterwards.
   */
  texts?: Record<string, string>;
}

/**
 * Appends to the trail in the caller's transaction. Each entry's hash covers its content and the hash before it; the
 * write lock of the transaction keeps two writers from taking the same predecessor.
 */
export async function appendTrail(request: TrailRequest, transaction: Transaction): Promise<TrailEntry> {
  const last = await TrailEntry.findOne({ order: [['id', 'DESC']], attributes: ['hash'], transaction });
  const texts = saltTexts(request.texts ?? {});
  const content = {
    at: request.at,
    actorId: request.actor === 'system' ? null : request.actor.userId,
    actorRole: request.actor === 'system' ? ('system' as const) : request.actor.role,
    subjectType: request.subjectType,
    subjectId: request.subjectId,
    action: request.action,
    details: texts.length > 0 ? { ...request.details, textDigests: digestsOf(texts) } : request.details,
  };
  const previousHash = last?.hash ?? '';
  const entry = await TrailEntry.create(
    { ...content, previousHash, hash: trailHash(content, previousHash) },
    { transaction },
  );
  await TrailText.bulkCreate(
    texts.map((text) => ({ ...text, trailId: entry.id })),
    { transaction },
  );
  return entry;
}

interface SaltedText {
  field: string;
  salt: string;
  text: string;
}

function saltTexts(texts: Record<string, string>): SaltedText[] {
  return Object.entries(texts)
    .filter(([, text]) => text !== '')
    .map(([field, text]) => ({ field, text, salt: randomBytes(16).toString('hex') }));
}

const digestsOf = (texts: readonly SaltedText[]) =>
  Object.fromEntries(texts.map(({ field, salt, text }) => [field, textDigest(salt, text)]));

/** What an entry holds in the place of a text. */
export function textDigest(salt: string, text: string): string {
  return createHash('sha256').update(`${salt}:${text}`).digest('hex');
}

/** SHA-256 over the previous hash and the entry's content as JSON. */
export function trailHash(content: object, previousHash: string): string {
  return createHash('sha256').update(previousHash).update(JSON.stringify(content)).digest('hex');
}
