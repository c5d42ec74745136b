import type { BankEventKind } from '@/lib/contract/banks';
import { formatCount, formatNumber, formatPercent } from '@/lib/units';

import type { Rule, ScreenContext } from '../screenTypes';
import { eventWord } from './history';
import { likelySlip, swappedFigures } from './scale';

/** Standardised residuals at which the outlier screen lists a check and sets it aside: section 7 of lib/fit's README. */
export const listCut = 3.5;
export const quarantineCut = 4;

/** What brings a bank off its own course, up or down, and is no mistake. */
const reasonsUp: readonly BankEventKind[] = [
  'rebalanced',
  'cellReplaced',
  'meterChanged',
  'bmsChanged',
  'layoutChanged',
];
const reasonsDown: readonly BankEventKind[] = [
  'cellFailed',
  'swollen',
  'cellReplaced',
  'retired',
  'meterChanged',
  'bmsChanged',
];

/** The last such event since the bank's check before this one. */
function reasonFor({ bank, fields, previousChecks }: ScreenContext, kinds: readonly BankEventKind[]) {
  const { testedOn } = fields.reading;
  const before = previousChecks.map((check) => check.testedOn).filter((day) => day < testedOn);
  const since = before.sort().at(-1) ?? '';
  return bank.events.findLast(
    ({ happenedOn, kind }) => happenedOn >= since && happenedOn <= testedOn && kinds.includes(kind),
  );
}

/** The capacity against what the pool expects under the bank's conditions, and the bank's own checks lead on to. */
export const poolResidual: Rule = (context) => {
  const { pool, fields } = context;
  // A slip of scale is to be mended first.
  if (!pool || likelySlip(context) || swappedFigures(context)) return null;
  const { seenFraction, expectedFraction, t, others } = pool;
  const size = Math.abs(t);
  const { depthFraction, temperatureMeanC } = fields.conditions;
  const from =
    others === 0
      ? `banks used like it (${formatPercent(depthFraction)} deep, ${formatNumber(temperatureMeanC, { decimals: 0 })} °C)`
      : `its own ${others === 1 ? 'approved check' : `${formatCount(others)} approved checks`} and the pool`;
  const figures = `${formatPercent(seenFraction, 1)} of rated; ${formatPercent(expectedFraction, 1)} is expected from ${from}`;
  const isFine = size < listCut;
  const reason = isFine ? undefined : reasonFor(context, t < 0 ? reasonsDown : reasonsUp);
  const because = reason ? ` Event before it: ${eventWord(reason.kind)}.` : '';
  const isFailure = reason && ['cellFailed', 'swollen', 'retired'].includes(reason.kind);
  return {
    rule: 'poolResidual',
    title: isFine ? 'Fits the pool' : 'Far from the pool',
    severity: isFine ? 'fits' : size < quarantineCut || reason ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : reason
        ? `${figures}.${because}`
        : `${figures}. Check the figures and the conditions. If something failed, add the event: failures count.`,
    moderatorText: `${figures}: ${formatNumber(size, { decimals: 1 })} standard deviations ${t < 0 ? 'below' : 'above'}.${because}${isFailure ? ' A real failure belongs in the pool.' : ''}`,
    evidence: { seenFraction, expectedFraction, t: Number(t.toFixed(2)), otherChecks: others },
  };
};
