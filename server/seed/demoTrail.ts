import type { DemoBank, DemoCheck } from '@/data/demo/types';

import { trailHash } from '../trail/appendTrail';
import type { ComputedDemoCheck } from './demoChecks';
import { demoModeratorId } from './demoUsers';

/** An entry of the trail before it is chained; its keys stand in the order that the hash is taken over. */
interface Entry {
  at: Date;
  actorId: string;
  actorRole: 'owner' | 'moderator';
  subjectType: 'bank' | 'check';
  subjectId: string;
  action: string;
  details: Record<string, unknown>;
}

/**
 * What was done with a bank and its checks, as the commands of the product would have written it down: names and notes
 * are not in the trail itself.
 */
export function entriesOf(bank: DemoBank, checks: readonly ComputedDemoCheck[]): Entry[] {
  const owner = (
    at: string,
    rest: Pick<Entry, 'subjectType' | 'subjectId' | 'action' | 'details'>,
  ): Entry => ({
    at: new Date(at),
    ...{ actorId: bank.ownerId, actorRole: 'owner' },
    ...rest,
  });
  const ofBank = { subjectType: 'bank', subjectId: bank.id } as const;
  const { name: _name, ...fields } = bank.fields;
  return [
    owner(bank.createdAt, { ...ofBank, action: 'created', details: { fields } }),
    ...bank.events.map(({ id: eventId, note: _note, ...event }) =>
      owner(`${event.happenedOn}T20:00:00Z`, {
        ...ofBank,
        action: 'eventAdded',
        details: { eventId, ...event },
      }),
    ),
    ...checks.flatMap(({ check, computed }) => {
      const { note: _note, ...entered } = check.fields;
      const details = { entered, sources: check.fields.sources, edited: [], computed };
      const ofCheck = { subjectType: 'check', subjectId: check.id, action: 'submitted', details } as const;
      return [owner(check.submittedAt, ofCheck), ...decisionOn(check)];
    }),
  ];
}

function decisionOn({ id, state, decidedAt, decisionText }: DemoCheck): Entry[] {
  if (decidedAt === null) return [];
  const text = state === 'sentBack' ? { question: decisionText } : { reason: decisionText };
  return [
    {
      at: new Date(decidedAt),
      ...{
        actorId: demoModeratorId,
        actorRole: 'moderator',
        subjectType: 'check',
        subjectId: id,
        action: state,
      },
      details: { ...(decisionText === null ? {} : text), version: 2 },
    },
  ];
}

/** Puts entries in the order of time and chains each to the one before. */
export function chained(entries: readonly Entry[]) {
  let previousHash = '';
  return [...entries]
    .sort((a, b) => a.at.getTime() - b.at.getTime())
    .map((entry) => {
      const hash = trailHash(entry, previousHash);
      const row = { ...entry, previousHash, hash };
      previousHash = hash;
      return row;
    });
}
