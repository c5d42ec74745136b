import type { SentencePart } from '@/components/ui';
import type { Use } from '@/lib/contract/cells';
import { useParameters as parameters } from '@/lib/contract/chosenUse';
import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

/** "60 % deep" */
export const depthWords = (depth: number) => `${formatPercent(depth)} deep`;

/** "0.1 It", "0.05 It" */
export const rateWords = (it: number) => formatQuantity(it, 'It');

/** "25 °C" */
export const heatWords = (celsius: number) => formatQuantity(celsius, '°C', { decimals: 0 });

/** "half full", "60 % full" */
export const fullWords = (share: number) => (share === 0.5 ? 'half full' : `${formatPercent(share)} full`);

/** "clamped", "not clamped" */
export const heldWords = (isClamped: boolean) => (isClamped ? 'clamped' : 'not clamped');

const oftenNames: readonly { value: number; label: string }[] = [
  { value: 2, label: 'twice a day' },
  { value: 1.5, label: 'three times in two days' },
  { value: 1, label: 'once a day' },
  { value: 0.5, label: 'every other day' },
  { value: 0.3, label: 'twice a week' },
  { value: 0.14, label: 'once a week' },
  { value: 0.03, label: 'once a month' },
];

/** "once a day", "0.8 times a day" */
export const oftenWords = (cyclesPerDay: number): string =>
  oftenNames.find(({ value }) => value === cyclesPerDay)?.label ??
  `${formatNumber(cyclesPerDay)} times a day`;

const round = (value: number) => Number(value.toPrecision(6));
const share = {
  toShown: (value: number) => round(value * 100),
  fromShown: (shown: number) => round(shown / 100),
};
const plain = { toShown: (value: number) => value, fromShown: (shown: number) => shown };

/** The use as a sentence whose words can be changed. */
export const useSentenceParts: readonly SentencePart<Use>[] = [
  'Cycled ',
  {
    ...{ key: 'depthFraction', label: 'Depth of discharge', show: depthWords, ...share },
    ...{ unit: '%', min: parameters.depth.min, max: parameters.depth.max, step: 5 },
    hint: 'What a typical cycle takes out, as a share of the rated capacity.',
  },
  ' at ',
  {
    ...{ key: 'dischargeIt', label: 'Discharge rate', show: rateWords, ...plain },
    ...{ unit: 'It', min: parameters.rate.min, max: parameters.rate.max, step: 0.05 },
    hint: 'Mean current while discharging: 1 It empties the rated capacity in one hour.',
  },
  ', ',
  {
    ...{ key: 'cyclesPerDay', label: 'How often', show: oftenWords, options: oftenNames },
  },
  ', near ',
  {
    ...{ key: 'temperatureC', label: 'Temperature of the cells', show: heatWords, ...plain },
    ...{ unit: '°C', min: parameters.heat.min, max: parameters.heat.max, step: 1 },
    hint: 'Mean over the year, at the cells, not in the air. No charging below 0 °C.',
  },
  ', ',
  {
    ...{ key: 'socMeanFraction', label: 'Mean charge level', show: fullWords, ...share },
    ...{ unit: '%', min: parameters.full.min, max: parameters.full.max, step: 5 },
    hint: 'How full the bank is on average over day and night.',
  },
  ' on average, ',
  {
    ...{ key: 'isClamped', label: 'Clamping', show: heldWords },
    options: [
      { value: false, label: 'not clamped' },
      { value: true, label: 'clamped', hint: 'Held between end plates, at the force the maker gives.' },
    ],
  },
  '.',
];
