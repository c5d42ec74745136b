import { z } from 'zod';

const numbers = z.array(z.number());

/**
 * The published model, so that lives at any use can be computed by whoever has it: lib/fit/README.md, equations 2 to
 * 4 and 17 to 20. Numbers to nine significant digits. Cell types are those with at least 10 banks of 5 owners.
 */
export const publicModelSchema = z.object({
  /** One fit per calendar exponent, mixed by weight. */
  components: z.array(
    z.object({
      exponent: z.number(),
      weight: z.number(),
      /** In the order of `priors`. */
      psi: numbers,
      /** Lower triangle of the covariance of psi, row by row. */
      covariance: numbers,
      /** In the order of `cellTypes`: effect on ln q, its variance given psi, and how it moves with psi. */
      cellTypes: z.array(z.object({ m: z.number(), variance: z.number(), slope: numbers })),
    }),
  ),
  priors: z.array(z.object({ name: z.string(), mean: z.number(), sd: z.number() })),
  cellTypes: z.array(
    z.object({
      id: z.string(),
      m: z.number(),
      se: z.number(),
      ownShareFraction: z.number(),
      reachYears: z.number(),
      reachEfc: z.number(),
    }),
  ),
  /** Widens lives and fade: 95 % quantile of Student's t with cell types + 4 degrees of freedom. */
  tQuantile: z.number(),
  reachYears: z.number(),
  reachEfc: z.number(),
  /** The middle 95 % of each condition in the pool. */
  conditions: z.array(
    z.object({
      condition: z.enum(['depthFraction', 'dischargeIt', 'temperatureC', 'socMeanFraction', 'efcPerYear']),
      from: z.number(),
      to: z.number(),
    }),
  ),
  hasClamped: z.boolean(),
  hasUnclamped: z.boolean(),
});
export type PublicModel = z.infer<typeof publicModelSchema>;
