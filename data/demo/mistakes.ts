import type { CheckFields } from '@/lib/contract/checks';

import { toStep } from './random';
import type { PendingKind } from './types';

/** What a mistake may look at besides the check itself. */
export interface MistakeContext {
  parallel: number;
  series: number;
  previous: CheckFields | null;
}

type Mistake = (fields: CheckFields, context: MistakeContext) => CheckFields;

const withReading = (fields: CheckFields, changes: Partial<CheckFields['reading']>): CheckFields => ({
  ...fields,
  reading: { ...fields.reading, ...changes },
});

/** The cells behind this bank are of 305 Ah; their owner chose the 250 Ah type. */
const wrongRatingFactor = 305 / 250;

/** What each kind of pending submission does to a sound check. */
const mistakes: Record<PendingKind, Mistake> = {
  clean: (fields) => fields,
  riseAfterRebalance: (fields) => ({ ...fields, note: 'First test after evening out the cells.' }),
  realFailure: (fields) => ({
    ...fields,
    note: 'Last test before I took the bank out. Cell 11 ended it early.',
  }),
  bankForCell: (fields, { parallel }) =>
    withReading(fields, { capacityAh: fields.reading.capacityAh * parallel }),
  cellsAdded: (fields, { series }) =>
    withReading(fields, { capacityAh: toStep(fields.reading.capacityAh * series, 0.1) }),
  wattHours: (fields) => withReading(fields, { capacityAh: fields.reading.energyWh }),
  wrongRating: (fields) =>
    withReading(fields, {
      capacityAh: toStep(fields.reading.capacityAh * wrongRatingFactor, 0.1),
      energyWh: Math.round(fields.reading.energyWh * wrongRatingFactor),
      durationS: Math.round(fields.reading.durationS * wrongRatingFactor),
    }),
  coldAndCutShort: (fields) => {
    const cut = 0.96;
    const shortened = withReading(fields, {
      capacityAh: toStep(fields.reading.capacityAh * cut, 0.1),
      energyWh: Math.round(fields.reading.energyWh * cut),
      durationS: Math.round(fields.reading.durationS * cut),
      ...{ dischargeEndedBy: 'load', endedByCell: null },
      ...{ lowestCellAtEndV: 3.02, highestCellAtEndV: 3.09 },
    });
    return { ...shortened, note: 'Done in the frost; the inverter stopped at its own limit.' };
  },
  duplicate: (fields, { previous }) =>
    previous ? { ...previous, reading: { ...previous.reading, testedOn: fields.reading.testedOn } } : fields,
  counterBackwards: (fields, { previous }) => {
    const before = previous?.conditions.counterValue ?? 0;
    return { ...fields, conditions: { ...fields.conditions, counterValue: Math.round(before * 0.31) } };
  },
};

/** Makes the mistake (or none) of a kind in a sound check. */
export function makeMistake(kind: PendingKind, fields: CheckFields, context: MistakeContext): CheckFields {
  return mistakes[kind](fields, context);
}
