import { Op } from 'sequelize';

import type { CheckState } from '@/lib/contract/checks';
import type { Health } from '@/lib/contract/steward';

import { Check } from '../db/models';
import { countByState } from '../moderation/queries';

const dayMs = 86_400_000;
const hourMs = 3_600_000;
const medianDays = 90;
const shareDays = [30, 90];
/** As the checks stand: one recalled later was approved, one still open is not decided. */
const taken: readonly CheckState[] = ['approved', 'recalled'];

/** How the queue stands, and how fast and how it has been decided lately. */
export async function screeningFigures(now: Date): Promise<Health['queue']> {
  const since = new Date(now.getTime() - medianDays * dayMs);
  const [counts, oldest, decided] = await Promise.all([
    countByState(),
    Check.min<Date | string | null, Check>('submittedAt', { where: { state: 'submitted' } }),
    Check.findAll({
      attributes: ['state', 'submittedAt', 'decidedAt'],
      where: { state: [...taken, 'turnedAway'], decidedAt: { [Op.gte]: since } },
      raw: true,
    }),
  ]);
  const rows = decided.map(({ state, submittedAt, decidedAt }) => ({
    isTaken: taken.includes(state),
    // A recall moves the instant of the decision, and says nothing of how long the queue took.
    hours: state === 'recalled' ? null : (ms(decidedAt!) - ms(submittedAt)) / hourMs,
    daysAgo: (now.getTime() - ms(decidedAt!)) / dayMs,
  }));
  return {
    counts,
    oldestSubmittedAt: oldest ? new Date(oldest).toISOString() : null,
    medianDecisionHours: median(rows.flatMap(({ hours }) => hours ?? [])),
    shares: shareDays.map((days) => {
      const within = rows.filter(({ daysAgo }) => daysAgo <= days);
      const approved = within.filter(({ isTaken }) => isTaken).length;
      return {
        days,
        decided: within.length,
        approvedFraction: within.length === 0 ? null : approved / within.length,
      };
    }),
  };
}

const ms = (instant: Date | string) => new Date(instant).getTime();

export function median(values: readonly number[]): number | null {
  if (values.length === 0) return null;
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}
