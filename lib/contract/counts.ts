import { z } from 'zod';

/** A count as the public gets it: exact from 20 up, below that as the range it lies in. */
export const countSchema = z.union([
  z.number().int(),
  z.object({ from: z.number().int(), to: z.number().int() }),
]);
export type Count = z.infer<typeof countSchema>;

/** How many stand behind a public figure. Given only where at least five owners do. */
export const toldEvidenceSchema = z.object({ owners: countSchema, banks: countSchema, checks: countSchema });
export type ToldEvidence = z.infer<typeof toldEvidenceSchema>;

/** Smallest value that a count can have. */
export const leastOf = (count: Count): number => (typeof count === 'number' ? count : count.from);
