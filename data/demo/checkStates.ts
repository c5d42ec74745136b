import type { CheckFields } from '@/lib/contract/checks';

import type { PlannedBank } from './people';
import { createDraws, type Draws } from './random';
import type { DemoCheck, PendingKind } from './types';

type Submission = Pick<
  DemoCheck,
  'fields' | 'state' | 'submittedAt' | 'decidedAt' | 'decisionText' | 'pending'
>;

interface SubmissionFacts {
  fields: CheckFields;
  pending: PendingKind | null;
  plan: PlannedBank | null;
  isLast: boolean;
}

/** Share of checks that were first given with Wh in the place of Ah, turned away and given anew. */
const slipShare = 0.002;

const hourMs = 3_600_000;
const after = (instant: string, hours: number) =>
  new Date(Date.parse(instant) + Math.round(hours * 60) * (hourMs / 60)).toISOString();

/** What became of a check after its test: one submission, or two where the first was turned away. */
export function submissionOf(draws: Draws, { fields, pending, plan, isLast }: SubmissionFacts): Submission[] {
  const evening = `${fields.reading.testedOn}T18:00:00.000Z`;
  const common = { fields, pending, decisionText: null };
  if (pending) return [{ ...common, state: 'submitted', submittedAt: waitingSince(fields), decidedAt: null }];
  const submittedAt = after(evening, draws.uniform(0, 40));
  const decidedAt = after(submittedAt, draws.uniform(12, 80));
  if (plan?.question && isLast)
    return [{ ...common, state: 'sentBack', submittedAt, decidedAt, decisionText: plan.question }];
  const approved: Submission = { ...common, state: 'approved', submittedAt, decidedAt };
  if (plan || !draws.chance(slipShare)) return [approved];
  const slipped = { ...fields, reading: { ...fields.reading, capacityAh: fields.reading.energyWh } };
  return [
    {
      ...{
        ...common,
        fields: slipped,
        state: 'turnedAway',
        submittedAt: after(evening, 0),
        decidedAt: submittedAt,
      },
      decisionText: 'The figure is in Wh. Please give the charge in Ah as a new check.',
    },
    { ...approved, submittedAt: after(submittedAt, 9), decidedAt: after(decidedAt, 9) },
  ];
}

/** Pending checks came in over the last days of the scenario, in the order of their tests. */
function waitingSince({ reading }: CheckFields): string {
  const day = Number(reading.testedOn.slice(8));
  const minutes = createDraws(day, 5).int(0, 180);
  return after('2026-11-27T07:00:00.000Z', (day - 2) * 3.2 + minutes / 60);
}
