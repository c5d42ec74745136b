import type { CheckFields } from '@/lib/contract/checks';
import { daysBetween, formatNumber, formatQuantity } from '@/lib/units';

import type { Rule, ScreenContext } from '../screenTypes';
import { comparableBefore } from './history';

type CounterKind = NonNullable<CheckFields['conditions']['counterKind']>;

/** Full cycles a day that home banks do; a standby bank lies below, and says so by its depth. Common practice, no source. */
const usualPerDay = { min: 0.02, max: 1.5 };
/** A counter further than this from depth x cycles x days, or fewer full cycles a day, is not of the unit given. */
const farRatio = 5;
const leastPerDay = 0.005;
/** How near another reading must come to the cycles by depth. */
const nearRatio = 1.5;
const shortestDays = 60;

const words: Record<CounterKind, string> = { efc: 'full cycles', ah: 'Ah', kwh: 'kWh' };

/** The counter's figure given under another unit, or a thousand times too large or small: another reading of it fits. */
export const counterUnit: Rule = (context) => {
  const { computed, fields, bank } = context;
  const { counterKind, counterValue } = fields.conditions;
  const now = computed.efcFromCounter;
  if (counterKind === null || counterValue === null || now === null) return null;
  const before = comparableBefore(context);
  const start = before?.computed.efc ?? 0;
  const days = daysBetween(before?.testedOn ?? bank.firstUseMonth, fields.reading.testedOn);
  if (days < shortestDays) return null;
  const byDepth = computed.efcFromDepth === null ? null : computed.efcFromDepth - start;
  if (!isFar(now - start, byDepth, days)) return null;
  const meant = readings(context, counterKind, counterValue)
    .filter(({ efc }) => isNear(efc - start, byDepth, days))
    .sort((a, b) => distance(a.efc - start, byDepth, days) - distance(b.efc - start, byDepth, days))[0];
  if (!meant) return null;
  const typed = formatQuantity(counterValue, words[counterKind], { decimals: 0 });
  const other = formatQuantity(counterValue * meant.factor, words[meant.kind], { significant: 4 });
  const cycles = formatQuantity(meant.efc, 'full cycles', { decimals: 0 });
  return {
    rule: 'counterUnit',
    title: 'Unit of the counter',
    severity: 'repairable',
    ownerText: `${typed} do not go with the time in use; ${other} would, which are ${cycles} since new. Check the counter's unit.`,
    moderatorText: `${typed} are ${formatNumber((now - start) / days, { significant: 2 })} full cycles a day; read as ${other} they are ${cycles} since new, which fits.`,
    evidence: {
      counterKind,
      counterValue,
      repairedKind: meant.kind,
      repairedValue: Number((counterValue * meant.factor).toPrecision(6)),
      repairedEfc: Number(meant.efc.toFixed(1)),
    },
  };
};

function readings(
  { bank }: ScreenContext,
  given: CounterKind,
  value: number,
): { kind: CounterKind; factor: number; efc: number }[] {
  const ratedAh = bank.ratedAhCell * bank.parallel;
  const perUnit: Record<CounterKind, number> = {
    efc: 1,
    ah: 1 / ratedAh,
    kwh: 1000 / (ratedAh * bank.nominalV * bank.series),
  };
  // Another unit was chosen, or the prefix of the same one is wrong; both at once would let any figure fit.
  const slips = (['efc', 'ah', 'kwh'] as const).flatMap((kind) =>
    (kind === given ? [1000, 1 / 1000] : [1]).map((factor) => ({ kind, factor })),
  );
  return slips.map(({ kind, factor }) => ({ kind, factor, efc: value * factor * perUnit[kind] }));
}

function isFar(gained: number, byDepth: number | null, days: number): boolean {
  const perDay = gained / days;
  if (perDay > 2 || perDay < leastPerDay) return true;
  return byDepth !== null && byDepth > 0 && Math.abs(Math.log(gained / byDepth)) > Math.log(farRatio);
}

function isNear(gained: number, byDepth: number | null, days: number): boolean {
  if (!(gained > 0)) return false;
  if (byDepth !== null && byDepth > 0) return Math.abs(Math.log(gained / byDepth)) < Math.log(nearRatio);
  return gained / days >= usualPerDay.min && gained / days <= usualPerDay.max;
}

const usualMiddle = 0.5;
const distance = (gained: number, byDepth: number | null, days: number) =>
  Math.abs(Math.log(gained / (byDepth !== null && byDepth > 0 ? byDepth : usualMiddle * days)));
