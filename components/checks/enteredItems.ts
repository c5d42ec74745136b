import type { CheckFields } from '@/lib/contract/checks';
import type { FieldSource } from '@/lib/contract/fields';
import {
  formatDate,
  formatDuration,
  formatNumber,
  formatPercent,
  formatQuantity,
  noValue,
} from '@/lib/units';

import { dischargeEndWords, fullChargeEndWords, methodWords } from './endWords';

type Entered = Pick<CheckFields, 'reading' | 'conditions' | 'sources'>;

const sourceWords: Record<FieldSource, string> = {
  metered: 'metered',
  readOff: 'read off',
  estimated: 'estimated',
};

/** One line of what was entered: a figure or words, and how it is known. */
export interface EnteredItem {
  label: string;
  value: string;
  isWords: boolean;
  source: string | undefined;
}

const item = (label: string, value: string | null, source?: FieldSource, isWords = false): EnteredItem[] =>
  value === null ? [] : [{ label, value, isWords, source: source && sourceWords[source] }];
const words = (label: string, value: string | null) => item(label, value, undefined, true);

const quantity = (value: number | null, unit: string, decimals: number) =>
  value === null ? null : formatQuantity(value, unit, { decimals });

const percent = (value: number | null) => (value === null ? null : formatPercent(value));

/** The day, the method and the meter. */
export const testItems = ({ reading }: Entered): EnteredItem[] => [
  ...item('Day', formatDate(reading.testedOn)),
  ...words('Charge', methodWords[reading.method]),
  ...words('Meter', reading.instrument),
  ...item('Its own error', formatPercent(reading.gainErrorFraction, 2)),
  ...item('Scatter', formatPercent(reading.readingNoiseFraction, 2)),
];

/** What the meter and the thermometer showed. */
export const meterItems = ({ reading, sources }: Entered): EnteredItem[] => [
  ...item('Charge', quantity(reading.capacityAh, 'Ah', 1), sources.capacityAh),
  ...item('Energy', quantity(reading.energyWh / 1000, 'kWh', 2), sources.energyWh),
  ...item('Mean current', quantity(reading.meanCurrentA, 'A', 1), sources.meanCurrentA),
  ...item('Duration', formatDuration(reading.durationS), sources.durationS),
  ...item('Cells at start', quantity(reading.temperatureStartC, '°C', 1), sources.temperatureStartC),
  ...item('Cells at end', quantity(reading.temperatureEndC, '°C', 1), sources.temperatureEndC),
];

/** How the bank was filled and emptied. */
export const endItems = ({ reading, sources }: Entered): EnteredItem[] => [
  ...words('Charge ended by', fullChargeEndWords[reading.fullChargeEndedBy].toLowerCase()),
  ...item('Rest after it', reading.restMinutes === null ? null : formatDuration(reading.restMinutes * 60)),
  ...item('Highest at full', quantity(reading.highestCellAtFullV, 'V', 3), sources.highestCellAtFullV),
  ...item('Lowest at full', quantity(reading.lowestCellAtFullV, 'V', 3), sources.lowestCellAtFullV),
  ...words('Ended by', dischargeEndWords[reading.dischargeEndedBy].toLowerCase()),
  ...words('Which cell', reading.endedByCell),
  ...item('Lowest at end', quantity(reading.lowestCellAtEndV, 'V', 3), sources.lowestCellAtEndV),
  ...item('Highest at end', quantity(reading.highestCellAtEndV, 'V', 3), sources.highestCellAtEndV),
];

const counterUnits = { efc: 'full cycles', ah: 'Ah', kwh: 'kWh' } as const;

/** How the bank lived since the check before. */
export const conditionItems = ({ conditions, sources }: Entered): EnteredItem[] => {
  const { counterKind, counterValue, socLowFraction, socHighFraction } = conditions;
  const counter =
    counterKind && counterValue !== null && formatQuantity(counterValue, counterUnits[counterKind]);
  const window =
    socLowFraction === null || socHighFraction === null
      ? null
      : `${formatNumber(socLowFraction * 100, { decimals: 0 })} to ${formatPercent(socHighFraction)}`;
  const isOfAir = conditions.temperatureOf === 'air';
  const mean = quantity(conditions.temperatureMeanC, '°C', 1) ?? noValue;
  return [
    ...item('Depth', percent(conditions.depthFraction), sources.depthFraction),
    ...item('In use, mean', quantity(conditions.dischargeIt, 'It', 3), sources.dischargeIt),
    ...item('Charging', quantity(conditions.chargeIt, 'It', 3), sources.chargeIt),
    ...item('Peak', quantity(conditions.peakIt, 'It', 3), sources.peakIt),
    ...item('Mean heat', isOfAir ? `${mean}, of the air` : mean, sources.temperatureMeanC),
    ...item('Hottest month', quantity(conditions.temperatureHottestC, '°C', 1), sources.temperatureHottestC),
    ...item('Coldest month', quantity(conditions.temperatureColdestC, '°C', 1), sources.temperatureColdestC),
    ...item('Coldest charge', quantity(conditions.coldestChargingC, '°C', 1), sources.coldestChargingC),
    ...item('Mean charge level', percent(conditions.socMeanFraction), sources.socMeanFraction),
    ...item('Charge window', window, sources.socLowFraction),
    ...item('Counter', counter || null, sources.counterValue),
    ...item('Cycles a day', quantity(conditions.cyclesPerDay, 'a day', 2), sources.cyclesPerDay),
    ...item(
      'Days idle',
      conditions.idleDays === null
        ? null
        : formatQuantity(conditions.idleDays, conditions.idleDays === 1 ? 'day' : 'days'),
      sources.idleDays,
    ),
    ...item('Idle at', percent(conditions.idleSocFraction), sources.idleSocFraction),
  ];
};
