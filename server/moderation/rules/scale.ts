import { usualMeanCellV } from '@/lib/measure';
import { formatNumber, formatQuantity } from '@/lib/units';

import type { Rule, ScreenContext } from '../screenTypes';
import { comparableBefore } from './history';

export type SlipName =
  'cellForBank' | 'parallelTwice' | 'seriesAddedUp' | 'whForAh' | 'kWhForAh' | 'mAhForAh';

interface Slip {
  name: SlipName;
  /** What the typed figure is to be divided by. */
  divisor: number;
  repairedAh: number;
  repairedSohFraction: number;
}

/** Share of rated capacity a bank in use shows: common practice, no source. */
export const plausibleSoh = { min: 0.6, max: 1.12 };
/** With an earlier check, a repaired figure must come this near to it. */
const nearToHistory = 0.12;
/** Mean voltage of a cell over a discharge, V, to turn Wh into Ah: common practice, no source. */
const usualCellV = 3.2;

/** Rated capacity of the whole bank, Ah. */
export const ratedBankAh = ({ bank }: ScreenContext) => bank.ratedAhCell * bank.parallel;

export const isPlausible = (sohFraction: number) =>
  sohFraction >= plausibleSoh.min && sohFraction <= plausibleSoh.max;

/**
 * Capacity and cell voltage as they would be with the cells in series and in parallel the other way round, where both
 * then fit; null where they do not. More in parallel than in series is rare at home, so only such a layout is doubted.
 */
export function swappedFigures({ bank, computed, fields }: ScreenContext) {
  const ratio = bank.series / bank.parallel;
  if (ratio >= 1 || isPlausible(computed.sohFraction)) return null;
  const { min, max } = usualMeanCellV[fields.reading.method];
  const [sohFraction, cellV] = [computed.sohFraction / ratio, computed.meanCellV * ratio];
  return isPlausible(sohFraction) && cellV >= min && cellV <= max ? { sohFraction, cellV } : null;
}

/**
 * The slip of scale that brings an implausible capacity back to a plausible one; where several would, the one that
 * comes nearest to the bank's last check, or to rated capacity. Null where the figure is plausible as it stands.
 */
export function likelySlip(context: ScreenContext): Slip | null {
  const { bank, fields, computed } = context;
  const before = comparableBefore(context);
  const isCloseEnough = (soh: number) =>
    before ? Math.abs(soh / before.computed.sohFraction - 1) <= nearToHistory : isPlausible(soh);
  const typed = computed.sohFraction;
  if (isPlausible(typed) || swappedFigures(context)) return null;
  const divisors: [SlipName, number][] = [
    ['cellForBank', 1 / bank.parallel],
    ['parallelTwice', bank.parallel],
    ['seriesAddedUp', bank.series],
    ['whForAh', bank.series * usualCellV],
    ['kWhForAh', (bank.series * usualCellV) / 1000],
    ['mAhForAh', 1000],
  ];
  const expected = before?.computed.sohFraction ?? 0.95;
  const distance = ({ repairedSohFraction }: Slip) => Math.abs(Math.log(repairedSohFraction / expected));
  const slips = divisors
    .filter(([, divisor]) => divisor !== 1)
    .map(([name, divisor]) => ({
      name,
      divisor,
      repairedAh: fields.reading.capacityAh / divisor,
      repairedSohFraction: typed / divisor,
    }))
    .filter(({ repairedSohFraction }) => isCloseEnough(repairedSohFraction));
  return slips.sort((a, b) => distance(a) - distance(b))[0] ?? null;
}

interface SlipWords {
  title: string;
  /** How the repaired value comes about, such as "452/2". */
  how: (context: ScreenContext) => string;
  /** What the owner is asked to look at. */
  ask: string;
}

/** A rule for one kind of slip: it speaks only where its slip is the likely one. */
export function slipRule(name: SlipName, { title, how, ask }: SlipWords): Rule {
  return (context) => {
    const slip = likelySlip(context);
    if (slip?.name !== name) return null;
    const typed = context.fields.reading.capacityAh;
    const ah = formatQuantity(slip.repairedAh, 'Ah', { decimals: 1 });
    const times = formatNumber(context.computed.sohFraction, { significant: 2 });
    const rated = formatQuantity(ratedBankAh(context), 'Ah');
    return {
      rule: name,
      title,
      severity: 'repairable',
      ownerText: `${formatQuantity(typed, 'Ah')} is ${times} times the rated ${rated} of the bank. ${ask}`,
      moderatorText: `Capacity is ${times} times the rated ${rated}; ${how(context)} it is ${ah}, which fits.`,
      evidence: {
        typedAh: typed,
        repairedAh: Number(slip.repairedAh.toFixed(2)),
        repairedSohFraction: Number(slip.repairedSohFraction.toFixed(4)),
        ratedAh: ratedBankAh(context),
      },
    };
  };
}
