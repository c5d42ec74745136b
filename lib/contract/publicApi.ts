import { z } from 'zod';

import { cellEntrySchema, poolSummarySchema, useSchema } from './cells';

const pageSize = (most: number, usual: number) => z.coerce.number().int().min(1).max(most).default(usual);

/** Cell types in the order of their keys; `after` is the last key of the page before. */
export const apiCellsQuerySchema = z.object({
  after: z.string().max(80).optional(),
  limit: pageSize(200, 50),
});

export const apiCellsSchema = z.object({
  pool: poolSummarySchema,
  use: useSchema,
  cells: z.array(cellEntrySchema),
  /** What to give as `after` for the next page; null on the last. */
  next: z.string().nullable(),
});

/** Rows of a release, whole banks at a time; without a number, of the latest. */
export const apiChecksQuerySchema = z.object({
  release: z.coerce.number().int().min(1).max(1_000_000).optional(),
  after: z
    .string()
    .regex(/^[A-Z0-9]{5}$/, 'Give the name of a bank in the release.')
    .optional(),
  limit: pageSize(1000, 100),
});

export const apiChecksSchema = z.object({
  release: z.number().int(),
  /** Columns as in the release's dictionary. */
  checks: z.array(z.record(z.string(), z.union([z.string(), z.number(), z.boolean()]))),
  next: z.string().nullable(),
});
