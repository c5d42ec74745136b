import { z } from 'zod';

import { estimateSchema, lifeStatusSchema } from './cells';
import { toldEvidenceSchema } from './counts';
import { instantSchema } from './fields';

/** What a release says of lives at the standard use: the average cell type, then each with a figure of its own. */
const releaseFigureSchema = z.object({
  /** Null: the average cell type. */
  cellType: z.string().nullable(),
  years: estimateSchema,
  status: lifeStatusSchema,
});
export const releaseFiguresSchema = z.array(releaseFigureSchema);
export type ReleaseFigures = z.infer<typeof releaseFiguresSchema>;

/** Banks that came, left, or have other checks than in the release before. */
export const releaseChangesSchema = z.object({
  came: z.number().int(),
  left: z.number().int(),
  changed: z.number().int(),
});
export type ReleaseChanges = z.infer<typeof releaseChangesSchema>;

export const releaseFileSchema = z.object({
  name: z.string(),
  type: z.string(),
  bytes: z.number().int(),
  sha256: z.string(),
});
export type ReleaseFile = z.infer<typeof releaseFileSchema>;

export const releaseSchema = z.object({
  number: z.number().int(),
  publishedOn: z.string(),
  note: z.string(),
  codeVersion: z.string(),
  evidence: toldEvidenceSchema,
  dataSha256: z.string(),
  changes: releaseChangesSchema,
  figures: releaseFiguresSchema,
  citation: z.string(),
  files: z.array(releaseFileSchema),
});
export type Release = z.infer<typeof releaseSchema>;

/** Newest first. */
export const releaseListSchema = z.object({ releases: z.array(releaseSchema) });

export const releaseParamsSchema = z.object({ number: z.coerce.number().int().min(1).max(1_000_000) });
export const releaseFileParamsSchema = releaseParamsSchema.extend({
  name: z.string().regex(/^[A-Za-z0-9][A-Za-z0-9._-]{0,60}$/),
});

/** Changes that do not go into the next release, and why. */
export const heldReasonSchema = z.enum(['tooFewAlike', 'classTooThin']);

export const releasePreviewSchema = z.object({
  /** Number the release would get. */
  number: z.number().int(),
  isMaking: z.boolean(),
  lastProblem: z.string().nullable(),
  evidence: toldEvidenceSchema.nullable(),
  changes: releaseChangesSchema,
  /** Groups of changes that wait, largest first. Banks only, no names. */
  held: z.array(
    z.object({
      kind: z.enum(['came', 'left', 'gained', 'changed']),
      reason: heldReasonSchema,
      banks: z.number().int(),
    }),
  ),
  /** Banks by how far their identifying fields are generalised. */
  levels: z.array(z.object({ name: z.string(), banks: z.number().int() })),
  fittedAt: instantSchema.nullable(),
  /** Figures at the standard use by the public fit in force, beside those of the last release. */
  moves: z.array(
    z.object({
      cellType: z.string().nullable(),
      before: estimateSchema.nullable(),
      after: estimateSchema.nullable(),
    }),
  ),
});
export type ReleasePreview = z.infer<typeof releasePreviewSchema>;

export const makeReleaseSchema = z.object({
  note: z.string().trim().min(1, 'Say in a sentence what is new.').max(2000, 'At most 2000 characters.'),
});
export type MakeRelease = z.infer<typeof makeReleaseSchema>;

export const releaseQueuedSchema = z.object({ isMaking: z.literal(true) });
