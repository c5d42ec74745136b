import { z } from 'zod';

import { countSchema } from './counts';

export const leverSchema = z.enum([
  'heat',
  'depth',
  'chargeLevel',
  'rate',
  'clampingLowRate',
  'clampingHighRate',
]);
export type Lever = z.infer<typeof leverSchema>;

/** The four verdicts on an effect. */
export const verdictSchema = z.enum(['shown', 'tooSmall', 'couldBeNone', 'notMeasured']);
export type EffectVerdict = z.infer<typeof verdictSchema>;

const sideSchema = z.object({ banks: countSchema, owners: countSchema });

/** What one lever does to a life: years at `to` over years at `from`, all else equal, with its 90 % range. */
export const effectSchema = z.object({
  lever: leverSchema,
  /** The use it is stated at, in words of the fit: typical or hard. */
  scenario: z.string(),
  from: z.union([z.number(), z.boolean()]),
  to: z.union([z.number(), z.boolean()]),
  ratio: z.object({ estimate: z.number(), lower: z.number(), upper: z.number() }),
  /** Share that comes from published studies, 0..1. */
  priorShareFraction: z.number(),
  /** Owners guess this condition: the effect is at least this, and its range is widened. */
  isAtLeast: z.boolean(),
  /** Leans on published studies: prior share of 25-50 %. */
  isLeaning: z.boolean(),
  verdict: verdictSchema,
  /** The smallest ratio above 1 that a pool like this would show 4 times in 5. */
  detectableRatio: z.number(),
  /** Banks and owners of the rate class, for clamping; null where fewer than five owners stand on a side. */
  evidence: z.object({ clamped: sideSchema, unclamped: sideSchema }).nullable(),
});
export type LeverEffect = z.infer<typeof effectSchema>;
