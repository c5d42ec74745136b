import { Op } from 'sequelize';

import { TrailEntry, TrailText } from '../db/models';
import { textDigest, trailHash } from './appendTrail';

interface TrailProblem {
  id: number;
  problem: string;
}

interface TrailState {
  entries: number;
  /** Hash of the last entry: written down elsewhere, it also proves that no end was cut off. */
  lastHash: string;
  problems: TrailProblem[];
}

const pageSize = 1000;

/**
 * Walks the trail from its first entry: each must follow on the one before, and carry the hash of its content. Texts
 * kept beside an entry must have the digest that it holds; erased ones are no fault.
 */
export async function verifyTrail(): Promise<TrailState> {
  const state: TrailState = { entries: 0, lastHash: '', problems: [] };
  let lastId = 0;
  for (;;) {
    const entries = await TrailEntry.findAll({
      where: { id: { [Op.gt]: lastId } },
      include: [{ model: TrailText, as: 'texts', separate: true }],
      order: [['id', 'ASC']],
      limit: pageSize,
    });
    for (const entry of entries) {
      state.problems.push(...problemsOf(entry, { id: lastId, hash: state.lastHash }));
      state.entries += 1;
      state.lastHash = entry.hash;
      lastId = entry.id;
    }
    if (entries.length < pageSize) return state;
  }
}

function problemsOf(entry: TrailEntry, before: { id: number; hash: string }): TrailProblem[] {
  const { id, at, actorId, actorRole, subjectType, subjectId, action, details, previousHash, hash } = entry;
  const problems: string[] = [];
  if (id !== before.id + 1) problems.push(`follows entry ${before.id}: entries in between are missing`);
  if (previousHash !== before.hash) problems.push('does not follow on the entry before it');
  // In the order in which appendTrail hashes it.
  const content = { at, actorId, actorRole, subjectType, subjectId, action, details };
  if (trailHash(content, previousHash) !== hash) problems.push('its content is not what was written');
  const digests = (details.textDigests ?? {}) as Record<string, string>;
  for (const { field, salt, text } of entry.texts ?? [])
    if (digests[field] !== textDigest(salt, text))
      problems.push(`its text "${field}" is not what was written`);
  return problems.map((problem) => ({ id, problem }));
}
