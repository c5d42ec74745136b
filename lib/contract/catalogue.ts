import { z } from 'zod';

import { formatSchema } from './cells';
import { cellIdSchema, idSchema, instantSchema, requiredText, wholeWithin, within } from './fields';
import { limits } from './limits';

const seen = { version: z.number().int().min(1) };
const reason = requiredText(limits.noteLength.max);

/** `declined` and `merged` ones are out of the catalogue, and stay in its trail. */
export const cellTypeStatusSchema = z.enum(['proposed', 'listed', 'declined', 'merged']);
export type CellTypeStatus = z.infer<typeof cellTypeStatusSchema>;

export const cellTypeFieldsSchema = z.object({
  maker: requiredText(limits.nameLength.max),
  name: requiredText(limits.nameLength.max),
  format: formatSchema,
  ratedAh: within(limits.ratedAh),
  nominalV: within(limits.nominalV),
  faceAreaMm2: within(limits.faceAreaMm2).nullable(),
  massKg: within(limits.massKg).nullable(),
});
export type CellTypeFields = z.infer<typeof cellTypeFieldsSchema>;

/** A claim as a data sheet states it; null is a condition that the sheet does not state. */
export const claimFieldsSchema = z
  .object({
    cycles: wholeWithin(limits.claimCycles),
    endOfLifeFraction: within(limits.endOfLifeFraction),
    depthFraction: within(limits.depthFraction).nullable(),
    chargeIt: within(limits.rateIt).nullable(),
    dischargeIt: within(limits.rateIt).nullable(),
    temperatureC: within(limits.temperatureC).nullable(),
    clamping: z.enum(['clamped', 'none', 'notStated']),
    clampForceN: within(limits.clampForceN).nullable(),
    whereItStands: requiredText(limits.noteLength.max),
  })
  .refine(({ clamping, clampForceN }) => clamping === 'clamped' || clampForceN === null, {
    path: ['clampForceN'],
    message: 'A force is given, but the claim is not said to be for clamped cells.',
  });
export type ClaimFields = z.infer<typeof claimFieldsSchema>;

/** The conditions without which a claim can be compared with nothing. */
export const claimConditionSchema = z.enum([
  'depthFraction',
  'chargeIt',
  'dischargeIt',
  'temperatureC',
  'clamping',
]);
export type ClaimCondition = z.infer<typeof claimConditionSchema>;

export const catalogueClaimSchema = z.object({
  ...claimFieldsSchema.shape,
  id: idSchema,
  /** Empty: it can be held against measured life. */
  notStated: z.array(claimConditionSchema),
});
export type CatalogueClaim = z.infer<typeof catalogueClaimSchema>;

export const catalogueEntrySchema = z.object({
  ...cellTypeFieldsSchema.shape,
  id: cellIdSchema,
  version: z.number().int(),
  status: cellTypeStatusSchema,
  mergedIntoId: cellIdSchema.nullable(),
  createdAt: instantSchema,
  banks: z.number().int(),
  checks: z.number().int(),
  claims: z.number().int(),
});
export type CatalogueEntry = z.infer<typeof catalogueEntrySchema>;

export const catalogueSchema = z.object({ cellTypes: z.array(catalogueEntrySchema) });

const changeSchema = z.object({ field: z.string(), before: z.string(), after: z.string() });

export const cataloguePageSchema = catalogueEntrySchema.extend({
  claims: z.array(catalogueClaimSchema),
  trail: z.array(
    z.object({
      at: instantSchema,
      by: z.enum(['owner', 'moderator', 'system']),
      action: z.string(),
      reason: z.string(),
      changes: z.array(changeSchema),
      /** The other cell type of a merge. */
      otherId: cellIdSchema.nullable(),
    }),
  ),
});
export type CataloguePage = z.infer<typeof cataloguePageSchema>;

/** `isRecomputeAccepted`: a new rated capacity or voltage works out anew every check that depends on it. */
export const editCellTypeRequestSchema = cellTypeFieldsSchema.extend({
  ...seen,
  isRecomputeAccepted: z.boolean().default(false),
});
export type EditCellTypeRequest = z.input<typeof editCellTypeRequestSchema>;

export const listCellTypeRequestSchema = z.object(seen);
export const declineCellTypeRequestSchema = z.object({ ...seen, reason });

/** Both versions as they were seen in the preview. */
export const mergeCellTypesRequestSchema = z.object({
  ...seen,
  intoId: cellIdSchema,
  intoVersion: z.number().int().min(1),
});
export type MergeCellTypesRequest = z.infer<typeof mergeCellTypesRequestSchema>;

export const mergePreviewSchema = z.object({
  from: catalogueEntrySchema,
  into: catalogueEntrySchema,
  claimsMoved: z.number().int(),
  /** The same claim stands on both. */
  claimsDropped: z.number().int(),
  approvedChecks: z.number().int(),
  /** The rated capacities differ, so that the checks moved are worked out anew. */
  isRecomputed: z.boolean(),
});
export type MergePreview = z.infer<typeof mergePreviewSchema>;

/** A claim added or put right; the version is that of the cell type, which every change of its claims moves on. */
export const claimRequestSchema = z.object({ ...seen, claim: claimFieldsSchema });
export const removeClaimQuerySchema = z.object({ version: z.coerce.number().int().min(1) });
