import { z } from 'zod';

import {
  chosen,
  durationText,
  optionalQuantityText,
  optionalText,
  quantityText,
  readBy,
  readThrough,
} from '@/components/forms';
import {
  type CheckFields,
  checkSourcedFieldsSchema,
  conditionsSchema,
  counterKindSchema,
  enteredConditionsSchema,
  enteredReadingSchema,
  readingSchema,
} from '@/lib/contract/checks';
import { type FieldSource, idSchema, text } from '@/lib/contract/fields';
import { limits } from '@/lib/contract/limits';

import type { CheckFormValues } from './checkValues';

/** A check read from its form: what is stored, and what goes with it on its way. */
export interface ReadCheck extends CheckFields {
  idempotencyKey: string;
  answer: string;
  version: number;
}

const { shape } = readingSchema;
const { shape: lived } = conditionsSchema;
const percent = 100;
const perKwh = 0.001;

const readingForm = z
  .object({
    testedOn: z.string().min(1, 'This is needed.').pipe(shape.testedOn),
    method: chosen(shape.method),
    instrument: z.string().pipe(shape.instrument),
    gainErrorFraction: quantityText(limits.gainErrorFraction, '%', percent),
    readingNoiseFraction: quantityText(limits.readingNoiseFraction, '%', percent),
    capacityAh: quantityText(limits.capacityAh, 'Ah'),
    energyWh: quantityText(limits.energyWh, 'kWh', perKwh),
    meanCurrentA: quantityText(limits.meanCurrentA, 'A'),
    durationS: durationText(limits.durationS),
    temperatureStartC: quantityText(limits.temperatureC, '°C'),
    temperatureEndC: quantityText(limits.temperatureC, '°C'),
    fullChargeEndedBy: chosen(shape.fullChargeEndedBy),
    restMinutes: optionalQuantityText(limits.restMinutes, 'min'),
    dischargeEndedBy: chosen(shape.dischargeEndedBy),
    endedByCell: optionalText(text(40)),
    lowestCellAtFullV: optionalQuantityText(limits.cellV, 'V'),
    highestCellAtFullV: quantityText(limits.cellV, 'V'),
    lowestCellAtEndV: quantityText(limits.cellV, 'V'),
    highestCellAtEndV: optionalQuantityText(limits.cellV, 'V'),
  })
  .transform(readBy(enteredReadingSchema));

const ignored = z.string().transform(() => null);
const share = quantityText(limits.socFraction, '%', percent);
const optionalShare = optionalQuantityText(limits.socFraction, '%', percent);

const counters = {
  efc: { limit: limits.efc, unit: 'full cycles' },
  ah: { limit: limits.counterAh, unit: 'Ah' },
  kwh: { limit: limits.counterKwh, unit: 'kWh' },
} as const;

/** What the counter's field asks for depends on what the counter shows. */
function counterForm(kind: string) {
  const known = counterKindSchema.safeParse(kind);
  if (known.success) {
    const { limit, unit } = counters[known.data];
    return {
      counterKind: z.string().transform(() => known.data),
      counterValue: quantityText(limit, unit),
      cyclesPerDay: optionalQuantityText(limits.cyclesPerDay, ''),
    };
  }
  return {
    counterKind: kind === 'none' ? ignored : chosen(counterKindSchema),
    counterValue: ignored,
    cyclesPerDay: quantityText(limits.cyclesPerDay, ''),
  };
}

const conditionsForm = readThrough((typed: CheckFormValues['conditions']) =>
  z
    .object({
      depthFraction: quantityText(limits.depthFraction, '%', percent),
      dischargeIt: quantityText(limits.rateIt, 'It'),
      chargeIt: optionalQuantityText(limits.rateIt, 'It'),
      peakIt: optionalQuantityText(limits.peakIt, 'It'),
      temperatureMeanC: quantityText(limits.temperatureC, '°C'),
      temperatureHottestC: optionalQuantityText(limits.temperatureC, '°C'),
      temperatureColdestC: optionalQuantityText(limits.temperatureC, '°C'),
      temperatureOf: chosen(lived.temperatureOf.unwrap()),
      coldestChargingC: optionalQuantityText(limits.temperatureC, '°C'),
      socMeanFraction: typed.socAs === 'mean' ? share : ignored,
      socLowFraction: typed.socAs === 'window' ? share : ignored,
      socHighFraction: typed.socAs === 'window' ? share : ignored,
      ...counterForm(typed.counterKind),
      idleDays: optionalQuantityText(limits.idleDays, 'days'),
      idleSocFraction: optionalShare,
    })
    .transform(readBy(enteredConditionsSchema)),
);

const isTrue = (message: string) => z.boolean().refine((value) => value, message);

/** Reads the form of a check into what is sent. Each part is held together in itself, so that a step can be tried alone. */
export const checkFormSchema: z.ZodType<ReadCheck, CheckFormValues> = readThrough((typed: CheckFormValues) =>
  z
    .object({
      isAware: isTrue('Read the cautions, then confirm it here.'),
      entry: chosen(z.enum(['log', 'typed'])),
      uploadId: typed.entry === 'log' ? readLog : ignored,
      photoId: optionalText(idSchema),
      idempotencyKey: idSchema,
      reading: readingForm,
      conditions: conditionsForm,
      sources: z.record(z.string(), z.string()).transform(() => chosenSources(typed)),
      note: text(limits.noteLength.max),
      answer: text(limits.noteLength.max),
      version: z.number(),
    })
    .transform(
      ({ reading, conditions, uploadId, photoId, sources, note, idempotencyKey, answer, version }) => {
        return { reading, conditions, uploadId, photoId, sources, note, idempotencyKey, answer, version };
      },
    ),
);

const readLog = z.string().min(1, 'Choose the file of the log, or type the figures.').pipe(idSchema);

/** Sources of fields that hold something; one of an empty field means nothing. */
function chosenSources({ reading, conditions, sources }: CheckFormValues): CheckFields['sources'] {
  const values: Record<string, string> = { ...reading, ...conditions };
  const isSaid = (field: keyof typeof sources) => sources[field] !== '' && values[field]?.trim() !== '';
  return Object.fromEntries(
    checkSourcedFieldsSchema.options.filter(isSaid).map((field) => [field, sources[field] as FieldSource]),
  );
}
