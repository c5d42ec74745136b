import {
  type Band,
  type CellEntry,
  type CellList,
  type CellPage,
  type Claim,
  type PoolSummary,
  standardUse,
} from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import { presentCellTypeBrief } from '../cellTypes/present';
import type { QuotedClaim } from '../db/models';
import type { FitInForce } from '../fits/currentFit';
import type { View } from '../fits/fitOutput';
import { presentView } from '../fits/presentView';
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
  };
}

/** The page of a cell type, whole or in one band. */
export function presentCell(
  cellType: LoadedCellType,
  band: AddressedBand | null,
  published: Published,
): CellPage {
  const { fit } = published;
  const { format, faceAreaMm2, massKg } = cellType;
  return {
    pool: presentPool(published),
    use: standardUse,
    cellType: { ...presentCellTypeBrief(cellType), format, faceAreaMm2, massKg },
    claims: cellType.claims.map(presentClaim),
    bands: addressedBands.map((addressed) => presentBand(addressed, findView(fit, cellType.id, addressed))),
    band: band?.key ?? null,
    view: presentView(findView(fit, cellType.id, band), fit !== null),
  };
}

function presentEntry(cellType: LoadedCellType, fit: FitInForce | null): CellEntry {
  const { evidence, life, absence } = presentView(findView(fit, cellType.id, null), fit !== null);
  const claims = cellType.claims.map(presentClaim);
  return { cellType: presentCellTypeBrief(cellType), evidence, life, absence, claims };
}

function presentPool({ fit, waiting }: Published): PoolSummary {
  const pool = fit?.output.pool;
  const isShown = pool !== undefined && pool.evidence.owners >= minimumOwners;
  return {
    evidence: isShown ? pool.evidence : null,
    reachYears: isShown ? pool.reachYears : null,
    fittedAt: fit?.fittedAt.toISOString() ?? null,
    waiting,
  };
}

const presentBand = ({ key, kind, label }: AddressedBand, view: View | undefined): Band => ({
  key,
  kind,
  label,
  hasEnoughOwners: view !== undefined && view.evidence !== null,
});

function findView(fit: FitInForce | null, cellTypeId: string, band: AddressedBand | null): View | undefined {
  const bandKey = band?.fitKey ?? null;
  return fit?.output.views.find((view) => view.cellType === cellTypeId && view.bandKey === bandKey);
}

/** N cycles at depth d are N x d EFC. */
function presentClaim(claim: QuotedClaim): Claim {
  const { cycles, depthFraction } = claim;
  return { ...claim.get(), efc: depthFraction === null ? null : cycles * depthFraction };
}
