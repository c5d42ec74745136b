import { outsideSentence } from '@/components/cells/lifeWords';
import type { BankUse, Contribution, Forecast, Pace, Standing, ToldCount } from '@/lib/contract/standing';
import { formatCount, formatNumber, formatPercent, formatQuantity, formatRange } from '@/lib/units';

/** A range of the standing wider than this many banks in ten tells too little for a sentence (judgement). */
const tooWide = 0.65;
const aboutHalf = { from: 0.45, to: 0.55 };
/** A pace within 10 % of the typical one differs "a little". */
const little = 0.1;

type Placed = Pick<Standing, 'pace' | 'basis' | 'checksUsed'>;

/** 0 to 10; the ends are never reached. */
const inTen = (fraction: number) => Math.min(9, Math.max(1, Math.round(fraction * 10)));
const rangeInTen = (lower: number, upper: number) => {
  const [from, to] = [inTen(lower), inTen(upper)];
  return from === to ? `about ${from} in 10` : `${from} to ${to} in 10`;
};
const checksWords = (count: number) => (count === 1 ? 'one check' : `${formatCount(count)} checks`);

export const isTooEarly = ({ fasterFraction: { lower, upper } }: Pace) => upper - lower > tooWide;

/** "It ages a little slower than 6 in 10 banks used like it (90 % range: slower than 4 to 8 in 10)." */
export function standingSentence({ pace, basis, checksUsed }: Placed): string | null {
  if (!pace) return null;
  const { estimate, lower, upper } = pace.fasterFraction;
  const like = basis === 'pool' ? 'banks of any cell type used like it' : 'banks used like it';
  if (isTooEarly(pace))
    return `Too early to tell whether it ages faster or slower than ${like}: after ${checksWords(checksUsed)} it could age slower than ${rangeInTen(lower, upper)} of them.`;
  if (estimate > aboutHalf.from && estimate < aboutHalf.to)
    return `It ages about as fast as half of the ${like} (90 % range: slower than ${rangeInTen(lower, upper)}).`;
  const some = Math.abs(pace.ratio.estimate - 1) < little ? 'a little ' : '';
  return estimate > 0.5
    ? `It ages ${some}slower than ${inTen(estimate)} in 10 ${like} (90 % range: slower than ${rangeInTen(lower, upper)}).`
    : `It ages ${some}faster than ${inTen(1 - estimate)} in 10 ${like} (90 % range: faster than ${rangeInTen(1 - upper, 1 - lower)}).`;
}

/** "Its fade runs at 1.1 times that of the typical one (0.9–1.4)." */
export const paceSentence = ({ ratio }: Pace): string =>
  `Its fade runs at ${formatNumber(ratio.estimate, { decimals: 2 })} times that of the typical one (90 % range ${formatRange(ratio.lower, ratio.upper, { decimals: 2 })}).`;

/** What a page may say of a forecast. */
export type ForecastTold = 'passed' | 'year' | 'range' | 'beyond' | 'notMeasured';

export function forecastTold({ status, support, passedFraction }: Forecast): ForecastTold {
  if (passedFraction > 0.5) return 'passed';
  if (support === 'notMeasured') return 'notMeasured';
  if (status === 'beyond') return 'beyond';
  return status === 'extrapolated' ? 'range' : 'year';
}

const yearRange = ({ inYear: { lower, upper } }: Forecast) => {
  if (upper === null) return `from ${lower}, its end past the readings`;
  return lower === upper ? String(lower) : `${lower}–${upper}`;
};

const ageRange = ({ years: { lower, upper }, inYear }: Forecast) =>
  inYear.upper === null
    ? `${formatNumber(lower, { decimals: 0 })} years or more`
    : `${formatRange(lower, upper, { decimals: 0 })} years`;

/** What stands beside it where one year is given. */
export const forecastAge = (forecast: Forecast): { value: string; words: string } => ({
  value: formatNumber(forecast.years.estimate, { decimals: 0 }),
  words: `since first use; 90 % range ${ageRange(forecast)}; about ${formatNumber(Math.round(forecast.efc.estimate / 100) * 100)} full cycles`,
});

/** The large figure and what stands below it. */
export function forecastFigure(forecast: Forecast): { value: string; words: string } {
  const range = yearRange(forecast);
  switch (forecastTold(forecast)) {
    case 'passed':
      return {
        value: String(forecast.inYear.estimate),
        words: `It has probably come down to 80 % of its rating already (${formatPercent(forecast.passedFraction)} sure).`,
      };
    case 'year':
      return {
        value: String(forecast.inYear.estimate),
        words: `80 % of rated, ${forecast.status}; 90 % range ${range}`,
      };
    case 'range':
      return {
        value: range.replace(', its end past the readings', ''),
        words: `80 % of rated, extrapolated: 90 % range only, ${ageRange(forecast)} since first use`,
      };
    case 'beyond':
      return {
        value: '–',
        words: '80 % of rated lies beyond what the readings can say: past three times their reach.',
      };
    case 'notMeasured':
      return {
        value: '–',
        words:
          '80 % of rated: not measured yet, as most of what could be said would come from published studies.',
      };
  }
}

/** "Of the fade to 80 % the calendar takes about 64 % (50–76 %), cycling the rest." */
export function calendarSentence({ calendarFraction: { estimate, lower, upper } }: Forecast): string {
  const range = formatRange(lower * 100, upper * 100, { decimals: 0, unit: '%' });
  if (lower < 0.5 && upper > 0.5)
    return `Which takes more of the fade to 80 %, the calendar or cycling, can't be told yet: the calendar's part is ${range}.`;
  const [more, less] = estimate > 0.5 ? ['the calendar', 'cycling'] : ['cycling', 'the calendar'];
  return `Of the fade to 80 %, ${more} takes more than ${less}: the calendar's part is ${formatPercent(estimate)} (90 % range ${range}).`;
}

/** "61 % deep at 0.12 It, 190 full cycles a year, near 19 °C, 55 % full on average, not clamped" */
export function usedWords(use: BankUse): string {
  return [
    `${formatPercent(use.depthFraction)} deep at ${formatQuantity(use.dischargeIt, 'It', { decimals: 2 })}`,
    `${formatCount(Math.round(use.efcPerYear))} full cycles a year`,
    `near ${formatQuantity(use.temperatureC, '°C', { decimals: 0 })}`,
    `${formatPercent(use.socMeanFraction)} full on average`,
    use.isClamped ? 'clamped' : 'not clamped',
  ].join(', ');
}

const noteSentences: Record<Standing['notes'][number], string> = {
  boughtUsed:
    'Bought used, so its start is not known: it is left out of pooled lives, and the comparison holds only as far as its age and full cycles are counted from new.',
  boughtUnknown:
    'How it was bought is not known, nor is its start: it is left out of pooled lives, and the comparison holds only as far as its age and full cycles are counted from new.',
  clampingUnclear:
    'Its clamping changed more than once, so it is left out of the pooled fit; it is compared by how it was held for most of its cycles.',
  checksSetAside:
    'The fit set a check aside that does not agree with the others; nothing here rests on it. If it was right, a check soon after it would show.',
};

export const noteSentence = (note: Standing['notes'][number]): string => noteSentences[note];

/** Why the bank is not placed; null where it is. */
export function absenceSentence({ state, outside }: Pick<Standing, 'state' | 'outside'>): string | null {
  switch (state) {
    case 'ready':
      return null;
    case 'noCheck':
      return 'There is no approved check to compare yet. The first one brings banks used like it onto this chart.';
    case 'noFit':
      return 'The pool has not been fitted over enough owners yet, so there is nothing to compare with.';
    case 'outside':
      return `${outsideSentence(outside)} Its own curve is shown alone.`;
  }
}

const told = ({ from, to }: ToldCount) => (from === to ? formatCount(from) : `${from} to ${to}`);

/** "Your 3 approved checks are among the 42 published on this cell type, of 12 to 19 banks." */
export function contributionSentence({ approved, published, cellType }: Contribution): string {
  if (approved === 0) return 'Nothing yet: a check counts once a moderator has approved it.';
  const own = approved === 1 ? 'Your approved check' : `Your ${formatCount(approved)} approved checks`;
  if (published === 0)
    return `${own} ${approved === 1 ? 'is' : 'are'} in the working fit, and ${approved === 1 ? 'waits' : 'wait'} to be published until the changes of at least 5 owners have come together.`;
  const which =
    published === approved
      ? `${own} ${approved === 1 ? 'is' : 'are'}`
      : `Of your ${formatCount(approved)} approved checks ${formatCount(published)} ${published === 1 ? 'is' : 'are'}`;
  if (!cellType)
    return `${which} in the public pool. Fewer than 5 owners stand behind this cell type so far, so yours bring its first own figure nearer.`;
  const one = published === 1 ? 'one of' : 'among';
  return `${which} ${one} the ${told(cellType.checks)} checks published on this cell type, of ${told(cellType.banks)} banks.`;
}
