import {
  type Band,
  type CellEntry,
  type CellList,
  type CellPage,
  type Claim,
  type Life,
  type PoolSummary,
  standardUse,
} from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import type { CellType } from '../db/models';
import { presentCellTypeBrief } from '../cellTypes/present';
import type { FitInForce } from '../fits/currentFit';
import { labelAt } from '../fits/labelAt';
import { presentFadeBins } from '../fits/fadeBins';
import { presentFailures } from '../fits/presentFailures';
import { presentModel } from '../fits/presentModel';
import { presentView } from '../fits/presentView';
import { presentPrice } from '../fits/pricesOf';
import { presentSurvival } from '../fits/survivalOf';
import { tellEvidence } from '../publicView/tellCounts';
import { type AddressedBand, addressedBands } from './bands';
import type { LoadedCellType } from './queries';

interface Published {
  fit: FitInForce | null;
  waiting: PoolSummary['waiting'];
}

/** The list: every cell type at the standard use, by the public fit. */
export function presentCells(cellTypes: readonly LoadedCellType[], published: Published): CellList {
  return {
    pool: presentPool(published),
    use: standardUse,
    cells: cellTypes.map((cellType) => presentEntry(cellType, published.fit)),
    model: presentModel(published.fit, () => true),
  };
}

/** The page of a cell type, whole or in one band, beside those that are like it. */
export function presentCell(
  cellType: LoadedCellType,
  related: readonly CellType[],
  band: AddressedBand | null,
  published: Published,
): Omit<CellPage, 'movedFrom'> {
  const { fit } = published;
  const shown = new Set([cellType.id, ...related.map(({ id }) => id)]);
  const told = isPoolShown(fit) ? fit.output : null;
  const { format, faceAreaMm2, massKg } = cellType;
  const whole = presentView(fit, cellType.id, null);
  return {
    pool: presentPool(published),
    use: standardUse,
    cellType: { ...presentCellTypeBrief(cellType), format, faceAreaMm2, massKg },
    claims: presentClaims(cellType, fit, whole.life),
    bands: addressedBands.map((addressed) => presentBand(cellType.id, addressed, fit)),
    band: band?.key ?? null,
    view: band ? presentView(fit, cellType.id, band.fitKey) : whole,
    effects: isPoolShown(fit) ? fit.output.effects : [],
    failures: presentFailures(fit, cellType.id),
    model: presentModel(fit, (id) => shown.has(id)),
    price: told && presentPrice(told, cellType.id),
    bins: told && whole.evidence ? presentFadeBins(told, cellType.id) : { years: [], efc: [] },
    survival: told && whole.evidence && presentSurvival(told, cellType.id),
    poolSurvival: told && presentSurvival(told, null),
    related: related.map(presentCellTypeBrief),
  };
}

function presentEntry(cellType: LoadedCellType, fit: FitInForce | null): CellEntry {
  const { evidence, life, absence } = presentView(fit, cellType.id, null);
  const claims = presentClaims(cellType, fit, life);
  return {
    cellType: { ...presentCellTypeBrief(cellType), format: cellType.format },
    price: isPoolShown(fit) ? presentPrice(fit.output, cellType.id) : null,
    ...{ evidence, life, absence, claims },
  };
}

const isPoolShown = (fit: FitInForce | null): fit is FitInForce =>
  fit !== null && fit.output.pool.evidence.owners >= minimumOwners;

function presentPool({ fit, waiting }: Published): PoolSummary {
  const pool = isPoolShown(fit) ? fit.output.pool : null;
  return {
    evidence: pool && tellEvidence(pool.evidence),
    reachYears: pool?.reachYears ?? null,
    fittedAt: fit?.fittedAt.toISOString() ?? null,
    waiting,
  };
}

function presentBand(
  cellTypeId: string,
  { key, kind, label, fitKey }: AddressedBand,
  fit: FitInForce | null,
): Band {
  const hasEnoughOwners = presentView(fit, cellTypeId, fitKey).evidence !== null;
  return { key, kind, label, hasEnoughOwners };
}

/** N cycles at depth d are N x d EFC; what they imply is the pooled model's word. */
function presentClaims(cellType: LoadedCellType, fit: FitInForce | null, life: Life | null): Claim[] {
  const model = life && isPoolShown(fit) ? fit.output.model : null;
  return cellType.claims.map((claim) => {
    const { cycles, depthFraction } = claim;
    return {
      ...claim.get(),
      efc: depthFraction === null ? null : cycles * depthFraction,
      ...labelAt(model, cellType.id, claim.get(), { use: standardUse, life }),
    };
  });
}
