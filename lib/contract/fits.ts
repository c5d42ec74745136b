import { z } from 'zod';

import { evidenceSchema } from './cells';
import { idSchema, instantSchema } from './fields';

export const fitKindSchema = z.enum(['working', 'public']);

/** One run of the fit, as moderators see it. */
export const fitRunSchema = z.object({
  id: idSchema,
  kind: fitKindSchema,
  isCurrent: z.boolean(),
  isGood: z.boolean(),
  reason: z.string().nullable(),
  fittedAt: instantSchema,
  durationMs: z.number(),
  dataHash: z.string(),
  codeVersion: z.string(),
  evidence: evidenceSchema,
});
export const fitListSchema = z.object({
  fits: z.array(fitRunSchema),
  isRefitRunning: z.boolean(),
});
export type FitList = z.infer<typeof fitListSchema>;
