import type { Absence, FadeView } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import { tellEvidence } from '../publicView/tellCounts';
import type { FitInForce } from './currentFit';
import type { StoredFigure, View } from './fitOutput';
import { presentBandCurve, presentBandLife } from './presentBand';

const nothing = { evidence: null, life: null, curve: [], dots: [] };

/**
 * A cell type as pages show it at the standard use: whole, by the pooled model; in one band, by the single curve
 * through that band's checks.
 */
export function presentView(fit: FitInForce | null, cellTypeId: string, bandKey: string | null): FadeView {
  if (!fit) return { ...nothing, absence: 'noFit' };
  const view = fit.output.views.find((one) => one.cellType === cellTypeId && one.bandKey === bandKey);
  return bandKey === null ? presentWhole(fit, cellTypeId, view) : presentBand(view);
}

/** The figure is the cell type's own, or the pool's where fewer than five owners or ten banks stand behind it. */
function presentWhole(
  { output: { pool, figures, poolFigure } }: FitInForce,
  cellTypeId: string,
  view: View | undefined,
): FadeView {
  if (pool.evidence.owners < minimumOwners) return { ...nothing, absence: 'tooFewOwners' };
  const evidence = view?.evidence ?? null;
  const own = evidence && figures.find(({ cellType }) => cellType === cellTypeId);
  const { life, curve }: StoredFigure = own ?? poolFigure;
  const absence: Absence | null = evidence ? null : 'tooFewOwners';
  return { evidence: told(evidence), life, absence, curve, dots: view ? presentDots(view) : [] };
}

function presentBand(view: View | undefined): FadeView {
  if (!view?.result) return { ...nothing, absence: 'tooFewOwners' };
  const { result } = view;
  const evidence = told(view.evidence);
  const dots = presentDots(view);
  if (!result.ok) return { evidence, life: null, absence: absences[result.reason], curve: [], dots };
  return { evidence, life: presentBandLife(result), absence: null, curve: presentBandCurve(result), dots };
}

const told = (evidence: View['evidence']) => evidence && tellEvidence(evidence);

const absences = {
  tooFewOwners: 'tooFewOwners',
  protectsOthers: 'tooFewOwners',
  tooFewChecks: 'tooFewChecks',
  tooLittleSpread: 'tooFewChecks',
  noFade: 'notConverged',
  notConverged: 'notConverged',
} as const satisfies Record<string, Absence>;

const presentDots = ({ dots }: View): FadeView['dots'] =>
  dots.map(([years, efc, sohFraction]) => ({ years, efc, sohFraction }));
