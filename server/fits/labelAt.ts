import type { Claim, Life, Use } from '@/lib/contract/cells';
import { type CataloguedClaim, type ClaimFigure, claimFigureAt, type PublishedFit } from '@/lib/fit';

interface Asked {
  use: Use;
  /** The life told of the cell type at that use; null where none is. */
  life: Life | null;
}

/** What a claim implies at a use, beside what is measured there of its cell type. */
export function labelAt(
  fit: PublishedFit | null,
  cellType: string,
  claim: CataloguedClaim,
  { use, life }: Asked,
): Pick<Claim, 'label' | 'labelAbsence'> {
  if (!fit || !life) return { label: null, labelAbsence: 'noFit' };
  // A single curve of a band is not what claims are held against.
  const basis = life.basis === 'cellType' ? 'cellType' : 'pool';
  return kept(fit, [cellType, claim, use, basis], () =>
    claimFigureAt(fit, claim, use, { cellType, life: { ...life, basis } }),
  );
}

/** A fit never changes, and each claim is asked of it many times over. */
const answers = new WeakMap<PublishedFit, Map<string, ClaimFigure>>();

function kept(fit: PublishedFit, question: unknown, answer: () => ClaimFigure): ClaimFigure {
  const known = answers.get(fit) ?? new Map<string, ClaimFigure>();
  answers.set(fit, known);
  const key = JSON.stringify(question);
  const told = known.get(key) ?? answer();
  known.set(key, told);
  return told;
}
