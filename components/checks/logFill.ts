import type { LogResult, Upload } from '@/lib/contract/uploads';
import { calendarDateOf } from '@/lib/units';

import { type CheckFormValues, shownText } from './checkValues';

type Reading = CheckFormValues['reading'];

/** One result of a log: the same file read anew gives another. */
export function resultKey({ id, result }: Upload): string {
  return result === null ? '' : [id, result.windowStartS, result.windowEndS, result.capacityAh].join('/');
}

/** Digits that keep within the half per cent in which an entry counts as the log's own. */
const significant = 5;
const rounded = (value: number) => Number(value.toPrecision(significant));
const voltDecimals = 3;
const volts = (value: number | null) => (value === null ? null : Number(value.toFixed(voltDecimals)));
const degrees = (value: number | null) => (value === null ? null : Number(value.toFixed(1)));

/** What a log says of the reading, as its fields show it; what it does not say is left out. */
export function readingOfLog(result: LogResult): Partial<Reading> {
  const found = {
    capacityAh: rounded(result.capacityAh),
    energyWh: result.energyWh === null ? null : rounded(result.energyWh),
    meanCurrentA: rounded(result.meanCurrentA),
    durationS: result.durationS,
    temperatureStartC: degrees(result.startTemperatureC ?? result.meanTemperatureC),
    temperatureEndC: degrees(result.endTemperatureC ?? result.meanTemperatureC),
    lowestCellAtFullV: volts(result.lowestCellAtFullV),
    highestCellAtFullV: volts(result.highestCellAtFullV),
    lowestCellAtEndV: volts(result.lowestCellAtEndV),
    highestCellAtEndV: volts(result.highestCellAtEndV),
  } as const;
  const said = Object.entries(found).filter(([, value]) => value !== null);
  return {
    ...Object.fromEntries(said.map(([field, value]) => [field, shownText(field as keyof Reading, value)])),
    ...(result.firstStamp === null ? {} : { testedOn: calendarDateOf(new Date(result.firstStamp)) }),
    method: 'countedDischarge',
  };
}
