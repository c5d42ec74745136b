import { z } from 'zod';

import { estimateSchema, evidenceSchema, lifeStatusSchema, useSchema } from './cells';
import { countSchema, toldEvidenceSchema } from './counts';
import { effectSchema } from './effects';
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
export type FitRun = z.infer<typeof fitRunSchema>;

export const fitListSchema = z.object({
  fits: z.array(fitRunSchema),
  isRefitRunning: z.boolean(),
});

export const fitParamsSchema = z.object({ fitId: idSchema });

/** What a run found about single checks and banks: for moderators. Banks by pseudonym. */
export const fitDetailSchema = z.object({
  run: fitRunSchema,
  /** Null for a run that failed. */
  findings: z
    .object({
      iterations: z.number(),
      totalIterations: z.number(),
      screenRounds: z.number(),
      screen: z.array(
        z.object({
          checkId: idSchema,
          bank: z.string(),
          cellType: z.string(),
          t: z.number(),
          action: z.enum(['quarantine', 'list']),
        }),
      ),
      excluded: z.array(
        z.object({ checkId: idSchema, bank: z.string(), cellType: z.string(), reason: z.string() }),
      ),
      influence: z.array(z.object({ bank: z.string(), parameter: z.string(), shiftInSe: z.number() })),
      statements: z.array(z.string()),
    })
    .nullable(),
});
export type FitDetail = z.infer<typeof fitDetailSchema>;

/** One parameter beside its prior. */
const parameterSchema = z.object({
  name: z.string(),
  estimate: z.number(),
  se: z.number(),
  priorMean: z.number(),
  priorSd: z.number(),
  priorShareFraction: z.number(),
  /** Where the prior's centre comes from. */
  source: z.string(),
});
export type FitParameter = z.infer<typeof parameterSchema>;

/** A summary of the checks in one bin of a picture: median and middle 80 %. At least five owners stand behind each. */
export const fitBinSchema = z.object({
  from: z.number().nullable(),
  to: z.number().nullable(),
  evidence: toldEvidenceSchema,
  median: z.number(),
  lower: z.number(),
  upper: z.number(),
  model: z.number().nullable(),
});
export type FitBin = z.infer<typeof fitBinSchema>;

export const residualConditionSchema = z.enum([
  'ageYears',
  'efc',
  'temperatureC',
  'depthFraction',
  'dischargeIt',
  'socMeanFraction',
]);
export type ResidualCondition = z.infer<typeof residualConditionSchema>;

const publishedLifeSchema = z.object({ years: estimateSchema, status: lifeStatusSchema });
const sidesSchema = z.object({ clamped: countSchema, unclamped: countSchema });

/** A public fit of the past: what it said at the standard use. */
export const pastFitSchema = z.object({
  fittedAt: instantSchema,
  codeVersion: z.string(),
  evidence: toldEvidenceSchema,
  average: publishedLifeSchema,
  lives: z.array(publishedLifeSchema.extend({ cellType: z.object({ id: z.string(), name: z.string() }) })),
});
export type PastFit = z.infer<typeof pastFitSchema>;

export const interactionSchema = z.object({
  lever: z.enum(['rate', 'depth', 'heat']),
  cut: z.number(),
  /** Added ln of the cycling fade of a clamped bank above the cut; null where too few owners stand behind it. */
  effect: z
    .object({ estimate: z.number(), se: z.number(), isShown: z.boolean(), banks: sidesSchema })
    .nullable(),
});
export type FitInteraction = z.infer<typeof interactionSchema>;

export const balanceConditionSchema = z.enum([
  'depthFraction',
  'dischargeIt',
  'temperatureC',
  'socMeanFraction',
  'ageYears',
  'efcPerYear',
]);

/** The public fit in force with what it is checked by. Every number stands for at least five owners. */
export const publicFitSchema = z.object({
  use: useSchema,
  fit: z
    .object({
      fittedAt: instantSchema,
      codeVersion: z.string(),
      evidence: toldEvidenceSchema,
      iterations: z.number(),
      reachYears: z.number(),
      reachEfc: z.number(),
      average: publishedLifeSchema,
      parameters: z.array(parameterSchema),
      exponents: z.array(z.object({ exponent: z.number(), weight: z.number() })),
      effects: z.array(effectSchema),
      coverage: z.object({
        checks: z.number(),
        within: z.array(z.object({ level: z.number(), shareFraction: z.number() })),
      }),
      residuals: z.array(z.object({ condition: residualConditionSchema, bins: z.array(fitBinSchema) })),
      predicted: z.array(fitBinSchema),
      strata: z.array(
        z.object({
          heat: z.string(),
          rate: z.string(),
          isClamped: z.boolean(),
          bins: z.array(fitBinSchema),
        }),
      ),
      matched: z
        .object({
          /** Clamped over unclamped capacity at equal age and conditions, with its 90 % range. */
          capacityRatio: estimateSchema,
          modelCapacityRatio: z.number(),
          classes: z.number(),
          banks: sidesSchema,
        })
        .nullable(),
      balance: z
        .array(
          z.object({
            condition: balanceConditionSchema,
            clampedMean: z.number(),
            unclampedMean: z.number(),
            standardisedDifference: z.number(),
          }),
        )
        .nullable(),
      interactions: z.array(interactionSchema),
      /** How much of the spread of heat and charge level in the pool is real, 0..1; the rest is guessing. */
      reliability: z.object({ temperatureFraction: z.number(), socFraction: z.number() }),
      statements: z.array(z.string()),
    })
    .nullable(),
  /** Public fits that were in force, newest first. */
  history: z.array(pastFitSchema),
});
export type PublicFit = z.infer<typeof publicFitSchema>;
export type PublishedFitReport = NonNullable<PublicFit['fit']>;
