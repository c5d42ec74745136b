import type { PoolCheck } from '../poolCheck';
import { referenceRelSd, tau } from './parameters';

/**
 * The pool as columns, sorted by cell type, bank and age. Conditions are centred as the model wants them.
 * `inverseWeight` 0 takes a check out of the fit while it keeps its place.
 */
export interface PoolTable {
  rows: number;
  banks: number;
  cellTypes: number;
  /** ln(capacity / rated). */
  y: Float64Array;
  /** 1/w with w = (relSd / 0.012)²; 0 for a check that is left out. */
  inverseWeight: Float64Array;
  /** w itself, kept when a check is left out. */
  weight: Float64Array;
  lnWeight: Float64Array;
  lnYears: Float64Array;
  /** ln(n / 500), n at least 1. */
  lnEfc: Float64Array;
  /** ln(D / 0.5). */
  lnDepth: Float64Array;
  /** ln(C / 0.2). */
  lnRate: Float64Array;
  tau: Float64Array;
  /** S - 0.5. */
  soc: Float64Array;
  /** 1 clamped, 0 not. */
  clamped: Float64Array;
  /** 1 for a check that no screen may take out. */
  kept: Uint8Array;
  /** The one added term of an interaction refit, or null. */
  extra: Float64Array | null;
  /** First row of each bank; one more entry at the end. */
  bankStart: Int32Array;
  /** First bank of each cell type; one more entry at the end. */
  cellTypeStart: Int32Array;
  bankKeys: string[];
  cellTypeKeys: string[];
  /** Place of each row in the caller's list. */
  inputRow: Int32Array;
}

/**
 * Sort checks into a table. Checks must already be valid (`findProblems`); a bank has one cell type.
 * @param checks rows of the pool, in any order
 * @param indices rows to take (default all)
 */
export function arrangePool(checks: readonly PoolCheck[], indices?: readonly number[]): PoolTable {
  const order = Int32Array.from(indices ?? checks.keys());
  const cellTypeKeys = sortedKeys(order, (i) => checks[i]!.cellType);
  const bankKeyRank = new Map(sortedKeys(order, (i) => checks[i]!.bank).map((key, rank) => [key, rank]));
  const cellTypeRank = new Map(cellTypeKeys.map((key, rank) => [key, rank]));
  const rank = new Float64Array(checks.length);
  const age = new Float64Array(checks.length);
  for (const i of order) {
    const { cellType, bank, ageYears } = checks[i]!;
    rank[i] = cellTypeRank.get(cellType)! * bankKeyRank.size + bankKeyRank.get(bank)!;
    age[i] = ageYears;
  }
  const sorted = order.sort((a, b) => rank[a]! - rank[b]! || age[a]! - age[b]! || a - b);
  return fillTable(checks, sorted, cellTypeKeys);
}

function sortedKeys(order: Int32Array, key: (i: number) => string): string[] {
  const keys = new Set<string>();
  for (const i of order) keys.add(key(i));
  return [...keys].sort((a, b) => (a < b ? -1 : 1));
}

function fillTable(checks: readonly PoolCheck[], sorted: Int32Array, cellTypeKeys: string[]): PoolTable {
  const rows = sorted.length;
  const column = () => new Float64Array(rows);
  const table: PoolTable = {
    rows,
    banks: 0,
    cellTypes: cellTypeKeys.length,
    y: column(),
    inverseWeight: column(),
    weight: column(),
    lnWeight: column(),
    lnYears: column(),
    lnEfc: column(),
    lnDepth: column(),
    lnRate: column(),
    tau: column(),
    soc: column(),
    clamped: column(),
    kept: new Uint8Array(rows),
    extra: null,
    bankStart: new Int32Array(0),
    cellTypeStart: new Int32Array(0),
    bankKeys: [],
    cellTypeKeys,
    inputRow: sorted,
  };
  const bankStart: number[] = [];
  const cellTypeStart: number[] = [];
  let before: PoolCheck | undefined;
  for (let row = 0; row < rows; row++) {
    const check = checks[sorted[row]!]!;
    if (check.cellType !== before?.cellType) cellTypeStart.push(bankStart.length);
    if (check.bank !== before?.bank || check.cellType !== before.cellType) {
      bankStart.push(row);
      table.bankKeys.push(check.bank);
    }
    writeRow(table, row, check);
    before = check;
  }
  table.banks = bankStart.length;
  table.bankStart = Int32Array.from([...bankStart, rows]);
  table.cellTypeStart = Int32Array.from([...cellTypeStart, bankStart.length]);
  return table;
}

function writeRow(table: PoolTable, row: number, check: PoolCheck): void {
  const weight = (check.relSd / referenceRelSd) ** 2;
  table.y[row] = Math.log(check.capacityAh / check.ratedAh);
  table.weight[row] = weight;
  table.lnWeight[row] = Math.log(weight);
  table.inverseWeight[row] = 1 / weight;
  table.lnYears[row] = Math.log(check.ageYears);
  table.lnEfc[row] = Math.log(Math.max(check.efc, 1) / 500);
  table.lnDepth[row] = Math.log(check.depthFraction / 0.5);
  table.lnRate[row] = Math.log(check.dischargeIt / 0.2);
  table.tau[row] = tau(check.temperatureC);
  table.soc[row] = check.socMeanFraction - 0.5;
  table.clamped[row] = check.isClamped ? 1 : 0;
  table.kept[row] = check.isKept ? 1 : 0;
}

/** The same table with other rows left out (a fresh weight column, all else shared). */
export function leaveOut(table: PoolTable, isLeftOut: (row: number) => boolean): PoolTable {
  const inverseWeight = table.weight.map((weight, row) => (isLeftOut(row) ? 0 : 1 / weight));
  return { ...table, inverseWeight };
}

/** The same table with one added term in ln of the cycling fade. */
export function withExtra(table: PoolTable, term: (row: number) => number): PoolTable {
  return { ...table, extra: Float64Array.from({ length: table.rows }, (_, row) => term(row)) };
}
