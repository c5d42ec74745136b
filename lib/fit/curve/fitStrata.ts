import { allBands, bandsByLever, type Band } from '../bands';
import type { PoolCheck } from '../poolCheck';
import { fitCurve } from './fitCurve';
import { holdBack } from './holdBack';
import type { CurveRefusal, CurveResult } from './types';

export interface FitStrataOptions {
  seed: number;
  /** Resamples of banks per curve; default 200. */
  bootstrap?: number;
  /** Owners needed behind every figure; default 5. */
  minOwners?: number;
  /** Largest share of a stratum's checks that may be one owner's, 0..1; default 1: any. */
  maxOwnerShare?: number;
  /** Whether strata are held back to keep those held back beside them; default true. */
  isComplementKept?: boolean;
  /** Fit no curve over all cell types together; they still count for what must be held back. */
  isByCellTypeOnly?: boolean;
  /** In place of `fitCurve`, where only who may be told of matters. */
  fit?: typeof fitCurve;
  /** Asked before each curve. */
  shouldStop?: () => boolean;
  /** After each curve. */
  onProgress?: (done: number, total: number) => void;
}

/** One stratified view: a cell type (null: the whole pool) in one band (null: all of it). */
export interface StratumCurve {
  /** Stable and unique: `<cell type or *>|<band or *>`. */
  key: string;
  cellType: string | null;
  bandKey: string | null;
  result: CurveResult;
}

export type FitStrataResult = { ok: true; curves: StratumCurve[] } | { ok: false; reason: 'stopped' };

interface Stratum {
  cellType: string | null;
  band: Band | null;
  checks: readonly PoolCheck[];
}

/**
 * Single curves over the whole pool and every cell type, whole and by each preset band of depth, rate,
 * heat and clamping. A stratum of fewer than `minOwners` owners is refused without numbers, and more are
 * held back ('protectsOthers') where a difference of shown figures, between bands of one cell type or
 * between cell types in one band, would isolate fewer owners than that (see holdBack).
 *
 * Deterministic: a stratum's draws depend on the seed and its key only. Returns `{ ok: false, reason:
 * 'stopped' }` when `shouldStop` says so.
 */
export function fitStrata(checks: readonly PoolCheck[], options: FitStrataOptions): FitStrataResult {
  const { seed, bootstrap, minOwners = 5, fit = fitCurve } = options;
  const strata = listStrata(checks);
  const refusals = refuse(strata, minOwners, options);
  const curves: StratumCurve[] = [];
  for (const [s, { cellType, band, checks: members }] of strata.entries()) {
    if (options.shouldStop?.()) return { ok: false, reason: 'stopped' };
    if (cellType === null && options.isByCellTypeOnly) continue;
    const bandKey = band?.key ?? null;
    const key = stratumKey(cellType, bandKey);
    const result = refusals[s] ?? fit(members, { seed: seed ^ hash(key), bootstrap, minOwners });
    curves.push({ key, cellType, bandKey, result });
    options.onProgress?.(curves.length, strata.length);
  }
  return { ok: true, curves };
}

/** Key of a stratum in `FitStrataResult`; null means all cell types, or no band. */
export function stratumKey(cellType: string | null, bandKey: string | null): string {
  return `${cellType ?? '*'}|${bandKey ?? '*'}`;
}

// Rows of one length: the whole pool first, then each cell type; in each the whole first, then the bands.
function listStrata(checks: readonly PoolCheck[]): Stratum[] {
  const byType = new Map<string | null, PoolCheck[]>([[null, [...checks]]]);
  for (const check of checks) {
    const members = byType.get(check.cellType);
    if (members) members.push(check);
    else byType.set(check.cellType, [check]);
  }
  const types = [...byType.keys()].sort((a, b) => (a === null || (b !== null && a < b) ? -1 : 1));
  return types.flatMap((cellType) => {
    const members = byType.get(cellType) as PoolCheck[];
    return [null, ...allBands].map((band) => ({
      cellType,
      band,
      checks: band ? members.filter((check) => band.includes(check)) : members,
    }));
  });
}

function refuse(
  strata: readonly Stratum[],
  minOwners: number,
  options: FitStrataOptions,
): (CurveRefusal | null)[] {
  const width = allBands.length + 1;
  const rows = strata.length / width;
  const columnsOfLever = Object.values(bandsByLever).map((bands) =>
    bands.map((band) => allBands.indexOf(band) + 1),
  );
  const levers = Array.from({ length: rows }, (_, row) =>
    columnsOfLever.map((columns) => columns.map((column) => row * width + column)),
  ).flat();
  const cellTypes = Array.from({ length: width }, (_, column) =>
    Array.from({ length: rows - 1 }, (__, row) => (row + 1) * width + column),
  );
  const views = strata.map(({ checks, band }, s) => ({
    checks,
    parent: band === null ? null : s - (s % width),
  }));
  return holdBack(views, [...levers, ...cellTypes], minOwners, options);
}

// FNV-1a, 32 bits.
function hash(text: string): number {
  let value = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) {
    value = Math.imul(value ^ text.charCodeAt(i), 0x01000193);
  }
  return value | 0;
}
