import { z } from 'zod';

import { idSchema, instantSchema } from './fields';

export const quantitySchema = z.enum([
  'time',
  'voltage',
  'current',
  'power',
  'temperature',
  'lowestCell',
  'highestCell',
  'cell',
  'counter',
]);

/** How the columns of a log are read; proposed by the server, corrected by the owner. */
export const logMappingSchema = z.object({
  delimiter: z.enum([',', ';', '\t']),
  decimal: z.enum(['.', ',']),
  /** Counted from 0; -1 = there is no header. */
  headerLine: z.number().int().min(-1).max(10_000),
  columns: z
    .array(
      z.object({
        index: z.number().int().min(0).max(1000),
        quantity: quantitySchema,
        unit: z.string().max(12),
      }),
    )
    // A row may hold every cell of a bank of 64 in series.
    .max(80),
  timeFormat: z.string().max(40),
  /** A part of the log to use, in seconds from its first stamp; null = the discharge found. */
  window: z
    .object({ startS: z.number(), endS: z.number() })
    .refine(({ startS, endS }) => startS < endS, 'The start must lie before the end.')
    .nullable()
    .default(null),
  /** Sign of the current while discharging; `auto` lets the voltage tell. */
  dischargeSign: z.enum(['auto', 'positive', 'negative']).optional(),
  /** Whether the charge in a gap is counted from the readings at its ends, or left out. */
  gaps: z.enum(['count', 'leaveOut']).optional(),
});
export type LogMapping = z.output<typeof logMappingSchema>;

export const logQuestionSchema = z.object({
  field: z.string(),
  text: z.string(),
  choices: z.array(z.string()),
});

export const recognisedLogSchema = z.object({
  encoding: z.string(),
  mapping: logMappingSchema,
  header: z.array(z.string()),
  sampleRows: z.array(z.array(z.string())),
  questions: z.array(logQuestionSchema),
});
export type RecognisedLog = z.output<typeof recognisedLogSchema>;

export const logWarningSchema = z.object({
  code: z.string(),
  text: z.string(),
  count: z.number().int().optional(),
  /** Line in the file, counted from 1. */
  atRow: z.number().int().optional(),
});

/** A log integrated: calculation 1, of the whole bank. Series are thinned for drawing. */
export const logResultSchema = z.object({
  capacityAh: z.number(),
  energyWh: z.number().nullable(),
  meanCurrentA: z.number(),
  meanTemperatureC: z.number().nullable(),
  startTemperatureC: z.number().nullable(),
  endTemperatureC: z.number().nullable(),
  startVoltageV: z.number().nullable(),
  endVoltageV: z.number().nullable(),
  lowestCellAtEndV: z.number().nullable(),
  highestCellAtEndV: z.number().nullable(),
  lowestCellAtFullV: z.number().nullable(),
  highestCellAtFullV: z.number().nullable(),
  durationS: z.number(),
  windowStartS: z.number(),
  windowEndS: z.number(),
  firstStamp: instantSchema.nullable(),
  rowsRead: z.number().int(),
  rowsUsed: z.number().int(),
  rowsSkipped: z.number().int(),
  legs: z.number().int(),
  gapChargeFraction: z.number(),
  /** Relative standard uncertainty that gaps in the log bring. */
  gapRelSd: z.number().optional(),
  warnings: z.array(logWarningSchema),
  series: z.object({
    timeS: z.array(z.number()),
    voltageV: z.array(z.number().nullable()),
    currentA: z.array(z.number()),
    temperatureC: z.array(z.number().nullable()),
  }),
});
export type LogResult = z.output<typeof logResultSchema>;

export const uploadStateSchema = z.enum(['received', 'working', 'ready', 'unclear', 'failed']);

/** `unclear`: the columns need the owner's answer. `failed`: `problem` says why. */
export const uploadSchema = z.object({
  id: idSchema,
  bankId: idSchema,
  filename: z.string(),
  bytes: z.number().int(),
  state: uploadStateSchema,
  progressFraction: z.number(),
  recognised: recognisedLogSchema.nullable(),
  result: logResultSchema.nullable(),
  problem: z.string().nullable(),
  createdAt: instantSchema,
});
export type Upload = z.output<typeof uploadSchema>;
export const remapUploadRequestSchema = z.object({ mapping: logMappingSchema });

/** A photo of the meter as it is kept: upright, without what the camera wrote beside the picture. Size in pixels. */
export const photoSchema = z.object({
  id: idSchema,
  bankId: idSchema,
  width: z.number().int(),
  height: z.number().int(),
  createdAt: instantSchema,
});
export type Photo = z.output<typeof photoSchema>;
