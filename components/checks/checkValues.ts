import type { z } from 'zod';

import { type Check, checkSourcedFieldsSchema } from '@/lib/contract/checks';
import type { FieldSource } from '@/lib/contract/fields';
import { clockOfDuration } from '@/lib/units';

export type SourcedField = z.infer<typeof checkSourcedFieldsSchema>;
type ReadingField = keyof Check['reading'];
type ConditionField = keyof Check['conditions'];

/**
 * What is typed and chosen in the form of a check, as text. Shares are typed in per cent, energy in kWh; names are the
 * contract's, so that the server's remarks find their field.
 */
export interface CheckFormValues {
  /** The step being filled in. */
  step: number;
  /** The cautions were read. */
  isAware: boolean;
  entry: 'log' | 'typed' | '';
  uploadId: string;
  /** The photo of the meter; empty without one. */
  photoId: string;
  /** Which result of a log was taken over, so that one read anew is offered again. */
  filledFrom: string;
  /** Drawn once per draft: sending twice stores one check. */
  idempotencyKey: string;
  reading: Record<ReadingField, string>;
  conditions: Record<ConditionField, string> & { socAs: 'mean' | 'window' };
  sources: Record<SourcedField, FieldSource | ''>;
  note: string;
  /** Answers a moderator's question while correcting. */
  answer: string;
  /** Of the check being corrected: which state of it this was typed over. 0 for a new one. */
  version: number;
}

const readingFields: ReadingField[] = [
  'testedOn',
  'method',
  'instrument',
  'gainErrorFraction',
  'readingNoiseFraction',
  'capacityAh',
  'energyWh',
  'meanCurrentA',
  'durationS',
  'temperatureStartC',
  'temperatureEndC',
  'fullChargeEndedBy',
  'restMinutes',
  'dischargeEndedBy',
  'endedByCell',
  'lowestCellAtFullV',
  'highestCellAtFullV',
  'lowestCellAtEndV',
  'highestCellAtEndV',
];

const conditionFields: ConditionField[] = [
  'depthFraction',
  'dischargeIt',
  'chargeIt',
  'peakIt',
  'temperatureMeanC',
  'temperatureHottestC',
  'temperatureColdestC',
  'temperatureOf',
  'coldestChargingC',
  'socMeanFraction',
  'socLowFraction',
  'socHighFraction',
  'counterKind',
  'counterValue',
  'cyclesPerDay',
  'idleDays',
  'idleSocFraction',
];

/** Stored to shown: 0.6 is typed as 60 %, 11570 Wh as 11.57 kWh. */
const shownPerStored: Partial<Record<ReadingField | ConditionField, number>> = {
  gainErrorFraction: 100,
  readingNoiseFraction: 100,
  energyWh: 0.001,
  depthFraction: 100,
  socMeanFraction: 100,
  socLowFraction: 100,
  socHighFraction: 100,
  idleSocFraction: 100,
};

/** A stored value as the field of its name shows it. */
export function shownText(field: ReadingField | ConditionField, value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'string') return value;
  if (field === 'durationS') return clockOfDuration(value);
  return String(Number((value * (shownPerStored[field] ?? 1)).toPrecision(10)));
}

const emptyTexts = <Field extends string>(fields: readonly Field[]) =>
  Object.fromEntries(fields.map((field) => [field, ''])) as Record<Field, string>;

const noSources = emptyTexts(checkSourcedFieldsSchema.options) as CheckFormValues['sources'];

/** What the step of the meter takes for granted until it is told otherwise. */
const meteredFields: readonly SourcedField[] = ['capacityAh', 'energyWh', 'meanCurrentA', 'durationS'];

/**
 * A form nothing has been typed into. Of the last check only the instrument is taken over: no figure of it may stand
 * where this one's is to be read.
 */
export function newCheckValues(last: Check | undefined, idempotencyKey: string): CheckFormValues {
  const reading = emptyTexts(readingFields);
  if (last) {
    for (const field of ['instrument', 'gainErrorFraction', 'readingNoiseFraction'] as const)
      reading[field] = shownText(field, last.reading[field]);
  }
  return {
    step: 0,
    isAware: false,
    entry: '',
    uploadId: '',
    photoId: '',
    filledFrom: '',
    idempotencyKey,
    reading,
    conditions: { ...emptyTexts(conditionFields), temperatureOf: 'cells', socAs: 'mean' },
    sources: {
      ...noSources,
      ...Object.fromEntries(meteredFields.map((field) => [field, 'metered'])),
    },
    note: '',
    answer: '',
    version: 0,
  };
}

/** Whether anything was said of how the bank lived yet. */
export const hasConditions = (conditions: CheckFormValues['conditions']): boolean =>
  conditionFields.some((field) => field !== 'temperatureOf' && conditions[field] !== '');

/** What is read anew each time, and never taken over. */
const readAnew: readonly ConditionField[] = ['counterValue', 'idleDays', 'idleSocFraction'];

/** A check's conditions with their sources, as a start for those of the next one. */
export function lastAnswers(check: Check): Pick<CheckFormValues, 'conditions' | 'sources'> {
  const { conditions, sources } = valuesOfCheck(check, 0);
  const kept = conditionFields.filter((field) => !readAnew.includes(field));
  const emptied = Object.fromEntries(readAnew.map((field) => [field, '']));
  return {
    conditions: { ...conditions, ...emptied },
    sources: Object.fromEntries(kept.map((field) => [field, sources[field]])) as CheckFormValues['sources'],
  };
}

/** A stored check, to be corrected; it opens where figures are looked over. */
export function valuesOfCheck(check: Check, lastStep: number): CheckFormValues {
  const texts = <Field extends ReadingField | ConditionField>(
    fields: readonly Field[],
    part: Record<Field, string | number | null>,
  ) =>
    Object.fromEntries(fields.map((field) => [field, shownText(field, part[field])])) as Record<
      Field,
      string
    >;
  const { reading, conditions, uploadId, photoId, sources, note } = check;
  return {
    step: lastStep,
    isAware: true,
    entry: uploadId === null ? 'typed' : 'log',
    uploadId: uploadId ?? '',
    photoId: photoId ?? '',
    filledFrom: uploadId ?? '',
    // Not sent with a correction; the field keeps the form of one shape.
    idempotencyKey: check.id,
    reading: texts(readingFields, reading),
    conditions: {
      ...texts(conditionFields, conditions),
      counterKind: conditions.counterKind ?? 'none',
      socAs: conditions.socMeanFraction === null ? 'window' : 'mean',
    },
    sources: { ...noSources, ...sources },
    note,
    answer: '',
    version: check.version,
  };
}
