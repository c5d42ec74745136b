import type { FieldPath } from 'react-hook-form';

import type { CheckFormValues } from './checkValues';

export interface CheckStep {
  title: string;
  /** What the button that leads here says after "Next: ". */
  next: string;
  /** What has to be right before the next step is shown. */
  fields: readonly FieldPath<CheckFormValues>[];
}

/** The form of a check in its short steps. */
export const checkSteps: readonly CheckStep[] = [
  { title: 'Before you start', next: 'cautions and preparation', fields: ['isAware'] },
  {
    title: 'The log, or typed',
    next: 'the log, or typed',
    fields: [
      'entry',
      'uploadId',
      'reading.testedOn',
      'reading.method',
      'reading.instrument',
      'reading.gainErrorFraction',
      'reading.readingNoiseFraction',
    ],
  },
  {
    title: 'What the meter says',
    next: 'what the meter says',
    fields: [
      'reading.capacityAh',
      'reading.energyWh',
      'reading.meanCurrentA',
      'reading.durationS',
      'reading.temperatureStartC',
      'reading.temperatureEndC',
      'photoId',
    ],
  },
  {
    title: 'How it was charged and ended',
    next: 'how it was charged',
    fields: [
      'reading.fullChargeEndedBy',
      'reading.restMinutes',
      'reading.highestCellAtFullV',
      'reading.lowestCellAtFullV',
      'reading.dischargeEndedBy',
      'reading.endedByCell',
      'reading.lowestCellAtEndV',
      'reading.highestCellAtEndV',
    ],
  },
  {
    title: 'How the bank lived',
    next: 'how the bank lived',
    fields: [
      'conditions.depthFraction',
      'conditions.dischargeIt',
      'conditions.chargeIt',
      'conditions.peakIt',
      'conditions.temperatureMeanC',
      'conditions.temperatureHottestC',
      'conditions.temperatureColdestC',
      'conditions.temperatureOf',
      'conditions.coldestChargingC',
      'conditions.socMeanFraction',
      'conditions.socLowFraction',
      'conditions.socHighFraction',
      'conditions.counterKind',
      'conditions.counterValue',
      'conditions.cyclesPerDay',
      'conditions.idleDays',
      'conditions.idleSocFraction',
    ],
  },
  { title: 'Look over and send', next: 'look over and send', fields: ['note', 'answer'] },
];

export const lastStep = checkSteps.length - 1;

/** The first step that one of some fields stands on; the last one for fields of none. */
export function firstStepOf(paths: readonly string[]): number {
  const steps = paths.map((path) =>
    checkSteps.findIndex(({ fields }) => fields.some((field) => field === path)),
  );
  const found = steps.filter((step) => step >= 0);
  return found.length > 0 ? Math.min(...found) : lastStep;
}
