import { z } from 'zod';

import { chosen, optionalQuantityText, quantityText, readBy, readThrough } from '@/components/forms';
import { limits } from '@/lib/contract/limits';
import { type CellTypeProposal, proposeCellTypeRequestSchema } from '@/lib/contract/proposals';

/** What is typed of a cell type that is not listed; the face in cm², as it is measured. */
export type ProposalValues = Record<keyof CellTypeProposal, string>;

export const emptyProposal: ProposalValues = {
  maker: '',
  name: '',
  format: 'prismatic',
  ratedAh: '',
  nominalV: '3.2',
  faceAreaMm2: '',
  massKg: '',
};

const { shape } = proposeCellTypeRequestSchema;
const cm2PerMm2 = 0.01;

export const proposalSchema: z.ZodType<CellTypeProposal, ProposalValues> = readThrough(() =>
  z
    .object({
      maker: z.string().pipe(shape.maker),
      name: z.string().pipe(shape.name),
      format: chosen(shape.format),
      ratedAh: quantityText(limits.ratedAh, 'Ah'),
      nominalV: quantityText(limits.nominalV, 'V'),
      faceAreaMm2: optionalQuantityText(limits.faceAreaMm2, 'cm²', cm2PerMm2),
      massKg: optionalQuantityText(limits.massKg, 'kg'),
    })
    .transform(readBy(proposeCellTypeRequestSchema)),
);
