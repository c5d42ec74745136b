import { z } from 'zod';

import { formatSchema } from './cells';
import { requiredText, within } from './fields';
import { limits } from './limits';

/** A cell type that is not listed, as its data sheet says it. */
export const proposeCellTypeRequestSchema = z.object({
  maker: requiredText(limits.nameLength.max),
  name: requiredText(limits.nameLength.max),
  format: formatSchema,
  /** Rated capacity of one cell, Ah. */
  ratedAh: within(limits.ratedAh),
  nominalV: within(limits.nominalV),
  /** Area of the large face that is clamped, mm². */
  faceAreaMm2: within(limits.faceAreaMm2).nullable().default(null),
  massKg: within(limits.massKg).nullable().default(null),
});
export type CellTypeProposal = z.output<typeof proposeCellTypeRequestSchema>;
export type CellTypeProposalInput = z.input<typeof proposeCellTypeRequestSchema>;
