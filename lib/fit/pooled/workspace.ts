import { baseParameterCount, calendarCount, cyclingCount } from './parameters';
import { hermiteRule, type HermiteRule } from './hermite';
import type { PoolTable } from './table';

export const bankNodes = 9;
export const cellTypeNodes = 3;
export const nodeCount = bankNodes * cellTypeNodes;
export const centreNode = 1;
/** Reduced coordinates of a bank beside its checks: c0, ln s, ln sc, ln su. */
export const reducedExtras = 4;

/** Where the quadrature of banks and cell types is centred; kept from one evaluation to the next. */
export interface Centres {
  /** Modes of u, banks x 3 (one for each node of the cell type's effect). */
  bankModes: Float64Array;
  cellTypeModes: Float64Array;
  /** Posterior sd of each cell type's effect, given psi. */
  cellTypeScales: Float64Array;
}

/**
 * Everything one evaluation writes into, allocated once per fit. Built as a plain literal: an object put together
 * from spreads is slow to read, which the inner loops feel.
 */
export interface Workspace {
  table: PoolTable;
  exponent: number;
  parameterCount: number;
  /** Number of regressors in ln q (9, or 10 with an added term) and their places in psi. */
  thetaCount: number;
  thetaIndex: Int32Array;
  centres: Centres;
  bankRule: HermiteRule;
  cellTypeRule: HermiteRule;
  /** Per check: GA + GB, and GA's share of it. */
  gross: Float64Array;
  calendarShare: Float64Array;
  /** Per check of one cell type x 27 nodes: v = V⁻¹r and d = dln(1-q)/du. */
  v: Float64Array;
  d: Float64Array;
  /** Per bank of one cell type x 27 nodes: weight and u; x 3: log-likelihood. */
  nodeWeight: Float64Array;
  nodeU: Float64Array;
  bankLogLikelihood: Float64Array;
  /** Per bank of one cell type: Σ1/w of the checks taken, and their number. */
  sumInverseWeight: Float64Array;
  activeCount: Int32Array;
  /** Scratch of one bank. */
  reduced: Float64Array;
  reducedAtNode: Float64Array;
  scoreMean: Float64Array;
  scoreAtNode: Float64Array;
  scoreAtCentre: Float64Array;
  leverage: Float64Array;
  design: Float64Array;
  product: Float64Array;
  /** When asked for: per bank its posterior mean score (x parameters) and the score of m. */
  bankScores: Float64Array | null;
}

/** Allocate the workspace of a fit. Size of the node arrays: the largest cell type's checks x 27 x 2. */
export function createWorkspace(table: PoolTable, exponent: number, centres: Centres): Workspace {
  const size = largestCellType(table);
  const thetaCount = calendarCount + cyclingCount + (table.extra ? 1 : 0);
  const thetaIndex = Int32Array.from({ length: thetaCount }, (_, i) =>
    i < calendarCount + cyclingCount ? i + 1 : baseParameterCount,
  );
  const width = size.bank + reducedExtras;
  return {
    table,
    exponent,
    thetaCount,
    thetaIndex,
    centres,
    parameterCount: baseParameterCount + (table.extra ? 1 : 0),
    bankRule: hermiteRule(bankNodes),
    cellTypeRule: hermiteRule(cellTypeNodes),
    gross: new Float64Array(table.rows),
    calendarShare: new Float64Array(table.rows),
    v: new Float64Array(size.rows * nodeCount),
    d: new Float64Array(size.rows * nodeCount),
    nodeWeight: new Float64Array(size.banks * nodeCount),
    nodeU: new Float64Array(size.banks * nodeCount),
    bankLogLikelihood: new Float64Array(size.banks * cellTypeNodes),
    sumInverseWeight: new Float64Array(size.banks),
    activeCount: new Int32Array(size.banks),
    reduced: new Float64Array(width * width),
    reducedAtNode: new Float64Array(width * width),
    scoreMean: new Float64Array(width),
    scoreAtNode: new Float64Array(width),
    scoreAtCentre: new Float64Array(width),
    leverage: new Float64Array(size.bank),
    design: new Float64Array(size.bank * thetaCount),
    product: new Float64Array(size.bank * thetaCount),
    bankScores: null,
  };
}

/**
 * Centres of a first evaluation: all effects zero; the nodes of a cell type as wide as its effect could be known
 * from that many banks, so that the first steps are not taken on three nodes far apart.
 * @param cellTypeSd prior sd of a cell type's effect
 * @param bankSd prior sd of a bank's pace
 */
export function freshCentres(table: PoolTable, cellTypeSd: number, bankSd: number): Centres {
  const cellTypeScales = Float64Array.from({ length: table.cellTypes }, (_, k) => {
    const banks = table.cellTypeStart[k + 1]! - table.cellTypeStart[k]!;
    return 1 / Math.sqrt(1 / cellTypeSd ** 2 + banks / (2 * bankSd ** 2));
  });
  return {
    bankModes: new Float64Array(table.banks * cellTypeNodes),
    cellTypeModes: new Float64Array(table.cellTypes),
    cellTypeScales,
  };
}

/** A copy, so that one fit can start where another ended without moving its centres. */
export function copyCentres(centres: Centres): Centres {
  return {
    bankModes: centres.bankModes.slice(),
    cellTypeModes: centres.cellTypeModes.slice(),
    cellTypeScales: centres.cellTypeScales.slice(),
  };
}

function largestCellType(table: PoolTable): { rows: number; banks: number; bank: number } {
  const largest = { rows: 0, banks: 0, bank: 0 };
  for (let k = 0; k < table.cellTypes; k++) {
    const first = table.cellTypeStart[k]!;
    const end = table.cellTypeStart[k + 1]!;
    largest.banks = Math.max(largest.banks, end - first);
    largest.rows = Math.max(largest.rows, table.bankStart[end]! - table.bankStart[first]!);
  }
  for (let i = 0; i < table.banks; i++) {
    largest.bank = Math.max(largest.bank, table.bankStart[i + 1]! - table.bankStart[i]!);
  }
  return largest;
}
