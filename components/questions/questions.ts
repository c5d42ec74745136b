import type { Lever } from '@/lib/contract/effects';
import type { ResidualCondition } from '@/lib/contract/fits';
import type { Use } from '@/lib/fit/pooled/published';

/** A question that one lever answers. */
export interface LeverQuestion {
  slug: string;
  title: string;
  /** What it is about, for the list of questions. */
  about: string;
  lever: Exclude<Lever, 'clampingLowRate' | 'clampingHighRate'>;
  /** The condition of a use that is moved. */
  condition: Extract<keyof Use, ResidualCondition>;
  /** The two ends as words: "cooler", "warmer". */
  better: string;
  /** Its number in words: "20 °C". */
  show: (value: number) => string;
  /** What else may stand behind the figure. */
  caveats: readonly string[];
  safety?: readonly string[];
}

const percent = (value: number) => `${Math.round(value * 100)} %`;

export const leverQuestions: readonly LeverQuestion[] = [
  {
    slug: 'depth',
    title: 'Shallow or deep?',
    about: 'How far a bank is emptied on a typical day.',
    lever: 'depth',
    condition: 'depthFraction',
    better: 'A shallower cycle',
    show: (value) => `${percent(value)} deep`,
    caveats: [
      'It is moved at the same full cycles a year: the same energy, in shallower and more frequent cycles. A larger bank for the same night is the plan’s question.',
      'Owners estimate depth to about a tenth; guessing makes an effect look smaller than it is.',
    ],
  },
  {
    slug: 'rate',
    title: 'Fast or slow?',
    about: 'The mean current while discharging, in It.',
    lever: 'rate',
    condition: 'dischargeIt',
    better: 'A slower discharge',
    show: (value) => `${value} It`,
    caveats: [
      'Rate is known to about a fifth where it is estimated; guessing makes an effect look smaller than it is.',
      'Fast banks are often small ones, cycled deep: the model holds depth fixed, as far as owners report it.',
    ],
  },
  {
    slug: 'heat',
    title: 'Warm or cool?',
    about: 'The mean temperature at the cells over the year.',
    lever: 'heat',
    condition: 'temperatureC',
    better: 'A cooler place',
    show: (value) => `${value} °C`,
    caveats: [
      'Most owners estimate the mean temperature at the cells; guessing makes an effect look smaller than it is, so it is told as “at least”.',
      'A warm climate also means longer sunny days and other habits. What nobody asked for is not held fixed.',
    ],
    safety: [
      'Cooler is not colder: below 0 °C at the cells a lithium iron phosphate cell must not be charged, whatever the bank’s life. Keep to the maker’s limits.',
      'Cooling or moving a bank is work on it: the makers’ instructions and local codes come first.',
    ],
  },
  {
    slug: 'charge',
    title: 'Full or half full?',
    about: 'The mean charge level over the year.',
    lever: 'chargeLevel',
    condition: 'socMeanFraction',
    better: 'A lower mean charge level',
    show: (value) => `${percent(value)} full`,
    caveats: [
      'The mean charge level is an estimate for most banks; guessing makes an effect look smaller than it is, so it is told as “at least”.',
      'A bank kept low has less in hand for a dark week. What that costs is not in the figure.',
    ],
  },
];

/** Questions with pages of their own shape. */
export const clampingQuestion = {
  slug: 'clamping',
  title: 'Does clamping pay?',
  about: 'Cells held between end plates, or standing free.',
} as const;
export const endQuestion = {
  slug: 'end',
  title: 'Years or cycles: which ends a bank first?',
  about: 'How much of the fade time takes, and how much cycling.',
} as const;

export const allQuestions: readonly { slug: string; title: string; about: string }[] = [
  clampingQuestion,
  ...leverQuestions,
  endQuestion,
];
