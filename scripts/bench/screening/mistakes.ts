import { cellTypes } from '../../../data/demo/cellTypes';
import type { Draws } from '../../../data/demo/random';
import type { CheckFields } from '../../../lib/contract/checks';
import type { ScreenBank } from '../../../server/moderation/screenTypes';

/** A submission as its owner would have sent it. */
export interface Sent {
  fields: CheckFields;
  bank: ScreenBank;
}

/** What a mistake may look at besides the check. */
export interface MistakePlace {
  draws: Draws;
  previous: CheckFields | null;
}

/** Null where the mistake can't be made with this check. */
type Mistake = (sent: Sent, place: MistakePlace) => Sent | null;

const reading = (sent: Sent, changes: Partial<CheckFields['reading']>): Sent => ({
  ...sent,
  fields: { ...sent.fields, reading: { ...sent.fields.reading, ...changes } },
});
const conditions = (sent: Sent, changes: Partial<CheckFields['conditions']>): Sent => ({
  ...sent,
  fields: { ...sent.fields, conditions: { ...sent.fields.conditions, ...changes } },
});

const charge = (sent: Sent, factor: number) =>
  reading(sent, { capacityAh: sent.fields.reading.capacityAh * factor });
/** Charge, energy and time of a test that was of something else, or ended early. */
const wholeTest = (sent: Sent, factor: number, more: Partial<CheckFields['reading']> = {}) => {
  const { capacityAh, energyWh, durationS } = sent.fields.reading;
  return reading(sent, {
    ...{ capacityAh: capacityAh * factor, energyWh: energyWh * factor, durationS: durationS * factor },
    ...more,
  });
};
const upOrDown = (draws: Draws, least: number, most: number) =>
  draws.chance(0.5) ? 1 + draws.uniform(least, most) : 1 - draws.uniform(least, most);
const nextKind = { efc: 'ah', ah: 'kwh', kwh: 'ah' } as const;
/** Ratings this far apart are another cell type, not another batch. */
const otherRating = 0.18;

/** Gross mistakes by kind: each must end in a finding that is doubtful or repairable. */
export const mistakes: Record<string, Mistake> = {
  "a cell's Ah for the bank's": (sent) =>
    sent.bank.parallel > 1 ? charge(sent, 1 / sent.bank.parallel) : null,
  'parallel counted twice': (sent) => (sent.bank.parallel > 1 ? charge(sent, sent.bank.parallel) : null),
  'Ah of the series added up': (sent) => charge(sent, sent.bank.series),
  'Wh for Ah': (sent) => reading(sent, { capacityAh: sent.fields.reading.energyWh }),
  'kWh for Ah': (sent) => reading(sent, { capacityAh: sent.fields.reading.energyWh / 1000 }),
  'mAh for Ah': (sent) => charge(sent, 1000),
  'kWh for Wh': (sent) => reading(sent, { energyWh: sent.fields.reading.energyWh / 1000 }),
  'series and parallel swapped': (sent) =>
    sent.bank.parallel === sent.bank.series
      ? null
      : { ...sent, bank: { ...sent.bank, parallel: sent.bank.series, series: sent.bank.parallel } },
  'wrong rated capacity': (sent, { draws, previous }) => {
    const others = cellTypes.filter(
      ({ ratedAh }) => Math.abs(ratedAh / sent.bank.ratedAhCell - 1) > otherRating,
    );
    const near = others.filter(({ ratedAh }) => ratedAh / sent.bank.ratedAhCell < 2.5);
    return previous || near.length === 0
      ? null
      : { ...sent, bank: { ...sent.bank, ratedAhCell: draws.pick(near).ratedAh } };
  },
  'Ah typed wrong': (sent, { draws }) => charge(sent, upOrDown(draws, 0.1, 0.5)),
  'test of something else': (sent, { draws }) => wholeTest(sent, upOrDown(draws, 0.12, 0.5)),
  'rise without a reason': (sent, { draws, previous }) => {
    if (!previous || sent.bank.events.length > 0) return null;
    const factor =
      (previous.reading.capacityAh / sent.fields.reading.capacityAh) * (1 + draws.uniform(0.08, 0.15));
    return wholeTest(sent, factor);
  },
  'counter ran backwards': (sent, { draws, previous }) => {
    const { counterKind } = sent.fields.conditions;
    const before = previous?.conditions;
    if (!before?.counterValue || counterKind !== before.counterKind || sent.bank.events.length > 0)
      return null;
    return conditions(sent, { counterValue: Math.round(before.counterValue * draws.uniform(0.05, 0.8)) });
  },
  'counter of another unit': (sent) => {
    const { counterKind } = sent.fields.conditions;
    return counterKind && conditions(sent, { counterKind: nextKind[counterKind] });
  },
  'counter ten times too large': (sent) => {
    const { counterValue } = sent.fields.conditions;
    return counterValue === null ? null : conditions(sent, { counterValue: counterValue * 10 });
  },
  'depth far from the counter': (sent) => {
    const { counterValue, cyclesPerDay, depthFraction } = sent.fields.conditions;
    if (counterValue === null || cyclesPerDay === null || depthFraction < 0.2) return null;
    return conditions(sent, { depthFraction: depthFraction / 4 });
  },
  'cycles a day typed wrong': (sent) => {
    const { counterValue, cyclesPerDay } = sent.fields.conditions;
    return counterValue === null || cyclesPerDay === null
      ? null
      : conditions(sent, { cyclesPerDay: cyclesPerDay * 4 });
  },
  'minutes for hours': (sent) => reading(sent, { durationS: sent.fields.reading.durationS / 60 }),
  'current of one string': (sent) =>
    sent.bank.parallel > 1
      ? reading(sent, { meanCurrentA: sent.fields.reading.meanCurrentA / sent.bank.parallel })
      : null,
  '°F for °C': (sent) => {
    const { temperatureStartC, temperatureEndC } = sent.fields.reading;
    if (temperatureStartC < 10) return null;
    const fahrenheit = (value: number) => Math.min(70, (value * 9) / 5 + 32);
    return reading(sent, {
      temperatureStartC: fahrenheit(temperatureStartC),
      temperatureEndC: fahrenheit(temperatureEndC),
    });
  },
  'not charged full': (sent, { draws }) =>
    wholeTest(sent, draws.uniform(0.75, 0.92), {
      ...{ fullChargeEndedBy: 'time', highestCellAtFullV: 3.35, lowestCellAtFullV: 3.34 },
    }),
  'stopped early': (sent, { draws }) =>
    wholeTest(sent, draws.uniform(0.7, 0.9), {
      ...{ dischargeEndedBy: 'load', lowestCellAtEndV: 3.1, highestCellAtEndV: 3.15 },
    }),
  'cells far apart': (sent) =>
    reading(sent, { lowestCellAtFullV: sent.fields.reading.highestCellAtFullV - 0.45 }),
  'last check given again': (sent, { previous }) =>
    previous && {
      ...sent,
      fields: { ...previous, reading: { ...previous.reading, testedOn: sent.fields.reading.testedOn } },
    },
  'year of first use typed wrong': (sent, { previous }) => {
    const { counterValue } = sent.fields.conditions;
    const month = sent.fields.reading.testedOn.slice(0, 7);
    const isOld = Number(month.slice(0, 4)) - Number(sent.bank.firstUseMonth.slice(0, 4)) >= 2;
    if (previous || counterValue === null || !isOld) return null;
    return { ...sent, bank: { ...sent.bank, firstUseMonth: `${month.slice(0, 4)}-01` } };
  },
};
