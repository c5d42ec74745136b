import type { Message } from '@/lib/contract/checks';

import type { TrailEntry, TrailText } from '../db/models';

/** By what was done, not by the doer's role: a moderator who owns a bank speaks here as its owner. */
const speakers: Record<string, Message['by']> = {
  submitted: 'owner',
  edited: 'owner',
  resubmitted: 'owner',
  answered: 'owner',
  withdrawn: 'owner',
  sentBack: 'moderator',
  approved: 'moderator',
  turnedAway: 'moderator',
  recalled: 'moderator',
  corrected: 'moderator',
  realFailure: 'moderator',
  merged: 'moderator',
  decisionUndone: 'moderator',
  turnAwayProposed: 'moderator',
  recallProposed: 'moderator',
  lookedAtBlind: 'moderator',
  objected: 'owner',
};

/** What moderators say among themselves. */
const internal = new Set(['turnAwayProposed', 'recallProposed', 'lookedAtBlind']);

/** The trail of a check as messages. Who acted stays inside: only the side they stand on is told. */
export function presentHistory(
  entries: readonly TrailEntry[],
  audience: 'owner' | 'moderator' = 'owner',
): Message[] {
  const shown = entries.filter(({ action }) => audience === 'moderator' || !internal.has(action));
  return shown.map(({ at, action, details, texts = [] }) => ({
    at: at.toISOString(),
    by: (Object.hasOwn(speakers, action) ? speakers[action] : undefined) ?? 'system',
    action,
    text: [details.question, details.reason, textOf(texts, 'answer')].find(isText) ?? '',
  }));
}

const textOf = (texts: readonly TrailText[], field: string) =>
  texts.find((text) => text.field === field)?.text;

const isText = (value: unknown): value is string => typeof value === 'string' && value !== '';
