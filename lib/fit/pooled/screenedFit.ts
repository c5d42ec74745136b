import { maximise, type Maximum } from './maximise';
import type { Prior } from './priors';
import { screenTable, type ScreenFinding } from './screen';
import { leaveOut, type PoolTable } from './table';
import type { Centres } from './workspace';

const maxRounds = 6;

/** A table without its outliers, and the fit they were found with. */
export interface ScreenedFit {
  ok: true;
  table: PoolTable;
  findings: ScreenFinding[];
  rounds: number;
  isSettled: boolean;
  /** Iterations of all rounds together, and of the first fit alone. */
  iterations: number;
  firstIterations: number;
  psi: Float64Array;
  centres: Centres;
}

/**
 * Fit, screen, leave out, refit warm, until the same checks are found twice (README section 7; 1 to 4 rounds are
 * usual, 6 allowed).
 */
export function fitScreened(
  table: PoolTable,
  options: {
    exponent: number;
    priors: readonly Prior[];
    start?: { psi: ArrayLike<number>; centres?: Centres };
    isScreening: boolean;
    shouldStop?: () => boolean;
  },
): ScreenedFit | Extract<Maximum, { ok: false }> {
  let current = table;
  let findings: ScreenFinding[] = [];
  let before = '';
  let iterations = 0;
  let firstIterations = 0;
  let start = options.start;
  for (let round = 1; ; round++) {
    const fit = maximise(current, { ...options, start: start?.psi, centres: start?.centres });
    if (!fit.ok) return fit;
    iterations += fit.iterations;
    if (round === 1) firstIterations = fit.iterations;
    const { psi } = fit.evaluation;
    const settled = (isSettled: boolean): ScreenedFit => ({
      ok: true,
      table: current,
      ...{ findings, rounds: round, isSettled, iterations, firstIterations, psi, centres: fit.centres },
    });
    if (!options.isScreening) return settled(true);
    const effects = Array.from(fit.evaluation.cellTypeMean, (m, k) => ({
      m,
      variance: 1 / fit.evaluation.cellTypeInformation[k]!,
    }));
    findings = screenTable(table, { psi, exponent: options.exponent, effects });
    const out = new Set(findings.filter(({ action }) => action === 'quarantine').map(({ row }) => row));
    const key = [...out].join(' ');
    if (key === before || round === maxRounds) return settled(key === before);
    before = key;
    current = leaveOut(table, (row) => out.has(row));
    start = { psi, centres: fit.centres };
  }
}
