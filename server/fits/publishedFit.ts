import { z } from 'zod';

import { type ParameterName, parameterNames, type PublishedFit } from '@/lib/fit';

const numbers = z.array(z.number());
const parameterSchema = z.enum([...parameterNames, 'extra'] satisfies ParameterName[] as [ParameterName]);

const componentSchema = z.object({
  exponent: z.number(),
  weight: z.number(),
  psi: numbers,
  covariance: numbers,
  cellTypes: z.array(z.object({ m: z.number(), variance: z.number(), slope: numbers })),
});

const cellTypeSchema = z.object({
  cellType: z.string(),
  m: z.number(),
  se: z.number(),
  banks: z.number(),
  owners: z.number(),
  checks: z.number(),
  ownShare: z.number(),
  reach: z.object({ years: z.number(), efc: z.number() }),
});

const conditionSchema = z.enum([
  'depthFraction',
  'dischargeIt',
  'temperatureC',
  'socMeanFraction',
  'efcPerYear',
]);

/** The pooled model of a fit, as lib/fit computes lives and ratios from it. */
export const publishedFitSchema = z.object({
  components: z.array(componentSchema).min(1),
  priors: z.array(z.object({ name: parameterSchema, mean: z.number(), sd: z.number(), source: z.string() })),
  cellTypes: z.array(cellTypeSchema),
  tQuantile: z.number(),
  reach: z.object({
    years: z.number(),
    efc: z.number(),
    conditions: z.array(z.object({ condition: conditionSchema, from: z.number(), to: z.number() })),
    clampedBanks: z.number(),
    unclampedBanks: z.number(),
  }),
}) satisfies z.ZodType<PublishedFit>;

/** The published part of a fit alone: what else it holds belongs to its diagnostics. */
export const publishedPart = ({
  components,
  priors,
  cellTypes,
  tQuantile,
  reach,
}: PublishedFit): PublishedFit => ({ components, priors, cellTypes, tQuantile, reach });
