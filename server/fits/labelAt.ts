import type { Claim, Life, Use } from '@/lib/contract/cells';
import { type LabelAtUse, labelAtYourUse, type PublishedFit } from '@/lib/fit';

import type { QuotedClaim } from '../db/models';
import { fitUse } from './figures';
import { asAverage } from './asAverage';

type Quoted = Pick<
  QuotedClaim,
  'cycles' | 'endOfLifeFraction' | 'depthFraction' | 'chargeIt' | 'dischargeIt' | 'temperatureC' | 'clamping'
>;

/**
 * What a claim implies at a use, beside what is measured there of its cell type. A ratio is given only for a life that
 * is the cell type's own, where the pool reaches the use and measures enough.
 */
export function labelAt(
  fit: PublishedFit | null,
  cellType: string,
  claim: Quoted,
  { use, life }: { use: Use; life: Life | null },
): Pick<Claim, 'label' | 'labelAbsence'> {
  if (!fit) return { label: null, labelAbsence: 'noFit' };
  const isOwn = life?.basis === 'cellType';
  const answer = implied(fit, isOwn ? cellType : null, claim, use);
  if (!answer.ok) {
    const isSilent = answer.reason === 'conditions not stated';
    return { label: null, labelAbsence: isSilent ? 'conditionsNotStated' : 'cannotBeMet' };
  }
  const { impliedYears, ratio } = answer;
  const inEfc = (years: number) => years * fitUse(use).efcPerYear;
  const isTold = isOwn && life.support !== 'notMeasured' && life.outside.length === 0;
  return {
    label: {
      impliedYears,
      impliedEfc: {
        estimate: inEfc(impliedYears.estimate),
        lower: inEfc(impliedYears.lower),
        upper: inEfc(impliedYears.upper),
      },
      ratio: isTold ? ratio : null,
    },
    labelAbsence: null,
  };
}

/** A fit never changes, and each claim is asked of it many times over. */
const answers = new WeakMap<PublishedFit, Map<string, LabelAtUse>>();

function implied(fit: PublishedFit, cellType: string | null, claim: Quoted, use: Use): LabelAtUse {
  const { cycles, endOfLifeFraction, depthFraction, chargeIt, dischargeIt, temperatureC, clamping } = claim;
  if (depthFraction === null) return { ok: false, reason: 'conditions not stated' };
  const isClamped = clamping === 'notStated' ? null : clamping === 'clamped';
  const asked = { cycles, depthFraction, chargeIt, dischargeIt, temperatureC, endShare: endOfLifeFraction };
  const known = answers.get(fit) ?? new Map<string, LabelAtUse>();
  answers.set(fit, known);
  const key = JSON.stringify([cellType, asked, isClamped, use]);
  const answer =
    known.get(key) ??
    labelAtYourUse(cellType === null ? fit : asAverage(fit, cellType), { ...asked, isClamped }, fitUse(use));
  known.set(key, answer);
  return answer;
}
