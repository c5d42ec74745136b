import { quantileOf } from './reach';
import { createPredictor, type PredictionFit, type Predictor } from './leaveOneOut';
import type { PoolTable } from './table';

/** A check far from what its bank's other checks lead to expect; `row` is its place in the table. */
export interface ScreenFinding {
  row: number;
  t: number;
  action: 'quarantine' | 'list';
}

export const quarantineCut = 4;
export const listCut = 3.5;
const lowestCut = 2.5;
// MAD of a normal variable is 0.6745 sd.
const madToSd = 1 / 0.6744897501960817;

/**
 * Outlier screen at a given fit (README section 7). In a bank with |t| above the cut the check with the lowest
 * predictive density goes, the rest is predicted anew, and so on. The cut is scaled by min(1, MAD of t), since an
 * error not yet found makes s too large, but is never below 2.5.
 * Rows that already carry no weight (out of range) are quarantined as they stand. Kept rows are passed over: they stay
 * in the fit, and nothing is predicted from them, so that a bank's failure does not cost its earlier checks.
 */
export function screenTable(table: PoolTable, fit: PredictionFit): ScreenFinding[] {
  const predictor = createPredictor(table, fit);
  const isOut = (row: number) => table.inverseWeight[row] === 0;
  const isPassed = (row: number) => isOut(row) || table.kept[row] === 1;
  const scale = Math.min(1, spreadOfT(table, predictor, isPassed));
  const cut = (level: number) => Math.max(lowestCut, level * scale);
  const quarantined = new Set<number>();
  const listed = new Set<number>();
  eachBank(table, (first, end, cellType) => {
    const bank = { first, end, cellType };
    removeWorst(predictor, bank, cut(quarantineCut), quarantined, isPassed);
    const isPassedOrGone = (row: number) => isPassed(row) || quarantined.has(row);
    removeWorst(predictor, bank, cut(listCut), listed, isPassedOrGone);
  });
  const findings: ScreenFinding[] = [];
  eachBank(table, (first, end, cellType) => {
    for (let row = first; row < end; row++) {
      if (!isOut(row) && !quarantined.has(row) && !listed.has(row)) continue;
      const isTaken = (other: number) => !isPassed(other) && !quarantined.has(other) && !listed.has(other);
      const { t } = predictor.predict(row, first, end, cellType, isTaken);
      findings.push({ row, t, action: listed.has(row) ? 'list' : 'quarantine' });
    }
  });
  return findings;
}

/** Call with each bank's first row, end and cell type. */
export function eachBank(
  table: PoolTable,
  call: (first: number, end: number, cellType: number) => void,
): void {
  for (let cellType = 0; cellType < table.cellTypes; cellType++) {
    for (let bank = table.cellTypeStart[cellType]!; bank < table.cellTypeStart[cellType + 1]!; bank++) {
      call(table.bankStart[bank]!, table.bankStart[bank + 1]!, cellType);
    }
  }
}

/** Robust sd of t over the pool: 1.48 x median |t - median|. */
function spreadOfT(table: PoolTable, predictor: Predictor, isOut: (row: number) => boolean): number {
  const values: number[] = [];
  eachBank(table, (first, end, cellType) => {
    for (let row = first; row < end; row++) {
      if (!isOut(row)) values.push(predictor.predict(row, first, end, cellType, (other) => !isOut(other)).t);
    }
  });
  const middle = quantileOf(values, 0.5);
  return (
    madToSd *
    quantileOf(
      values.map((value) => Math.abs(value - middle)),
      0.5,
    )
  );
}

/** A bank's rows, and which of them may be used. */
interface BankRows {
  first: number;
  end: number;
  cellType: number;
}

/** Take out the worst check while any is beyond the cut, then let back in what the rest agrees with after all. */
function removeWorst(
  predictor: Predictor,
  bank: BankRows,
  cut: number,
  removed: Set<number>,
  isOut: (row: number) => boolean,
): void {
  const isTaken = (row: number) => !isOut(row) && !removed.has(row);
  const own: number[] = [];
  for (;;) {
    const { isFar, worst } = look(predictor, bank, cut, isTaken);
    if (!isFar || worst === undefined) break;
    removed.add(worst);
    own.push(worst);
  }
  if (own.length < 2) return;
  for (const row of own) {
    const { t } = predictor.predict(row, bank.first, bank.end, bank.cellType, isTaken);
    if (Math.abs(t) > cut) continue;
    removed.delete(row);
    if (look(predictor, bank, cut, isTaken).isFar) removed.add(row);
  }
}

/** Whether any taken check is beyond the cut, and which has the lowest predictive density. */
function look(
  predictor: Predictor,
  { first, end, cellType }: BankRows,
  cut: number,
  isTaken: (row: number) => boolean,
): { isFar: boolean; worst: number | undefined } {
  let isFar = false;
  let worst: number | undefined;
  let lowest = Infinity;
  for (let row = first; row < end; row++) {
    if (!isTaken(row)) continue;
    const { t, lnDensity } = predictor.predict(row, first, end, cellType, isTaken);
    if (Math.abs(t) > cut) isFar = true;
    if (lnDensity < lowest) {
      lowest = lnDensity;
      worst = row;
    }
  }
  return { isFar, worst };
}
