import { at } from './parameters';
import type { Prior } from './priors';
import { evaluate, type Evaluation } from './evaluate';
import { invertPositive, solveWithRidge } from './symmetric';
import { copyCentres, createWorkspace, freshCentres, type Centres } from './workspace';
import type { PoolTable } from './table';

/** A maximised objective, or why there is none. */
export type Maximum =
  | {
      ok: true;
      evaluation: Evaluation;
      /** Inverse of information + prior precision, flat. */
      covariance: Float64Array;
      centres: Centres;
      /** Newton steps taken. */
      iterations: number;
    }
  | { ok: false; kind: 'unconverged' | 'stopped'; reason: string; iterations: number };

/** Where to start and when to give up. */
export interface MaximiseOptions {
  exponent: number;
  priors: readonly Prior[];
  /** psi to start from (default: the prior means). */
  start?: ArrayLike<number>;
  centres?: Centres;
  maxIterations?: number;
  /** Asked before every evaluation; true ends the fit. */
  shouldStop?: () => boolean;
}

const convergedAt = 1e-7;
const defaultMaxIterations = 60;
const maxHalvings = 12;
const maxFreshStarts = 3;
const smallGain = 0.02;
const priorSdCap = 2;
const lnSdCap = 1;
const cellTypeCap = 0.5;

/**
 * Newton's method on psi with the cell types' modes moved along (README equations 14 and 15). Steps are capped at
 * 2 prior sd (1 on the ln sd) and halved while the objective falls. Converged when g' I⁻¹ g < 1e-7.
 */
export function maximise(table: PoolTable, options: MaximiseOptions): Maximum {
  const { priors, exponent } = options;
  const centres = options.centres
    ? copyCentres(options.centres)
    : freshCentres(table, Math.exp(priors[at.lnSm]!.mean), Math.exp(priors[at.lnSu]!.mean));
  const work = createWorkspace(table, exponent, centres);
  const start = options.start ?? priors.map((prior) => prior.mean);
  const precision = priors.map((prior) => 1 / (prior.sd * prior.sd));
  const maxIterations = options.maxIterations ?? defaultMaxIterations;
  const stopped = { ok: false, kind: 'stopped', reason: 'the fit was stopped before it converged' } as const;

  if (options.shouldStop?.()) return { ...stopped, iterations: 0 };
  let current = evaluate(work, Float64Array.from(start), priors);
  let freshStarts = 0;
  for (let iteration = 0; iteration < maxIterations; iteration++) {
    const step = solveWithRidge(current.information, precision, current.gradient);
    if (!step || !Number.isFinite(current.objective)) {
      return unconverged('the information matrix could not be factorised', iteration);
    }
    const decrement = dot(current.gradient, step.x);
    if (decrement < convergedAt && step.ridge === 0) {
      const covariance = invertPositive(current.information, priors.length);
      if (covariance) return { ok: true, evaluation: current, covariance, centres, iterations: iteration };
    }
    const next = stepWithHalving(step.x, current, decrement);
    if (next === 'stopped') return { ...stopped, iterations: iteration };
    if (next.hasFallen && ++freshStarts > maxFreshStarts)
      return unconverged('the objective fell along every step tried', iteration);
    current = next.evaluation;
  }
  return unconverged(`no convergence in ${maxIterations} iterations`, maxIterations);

  function stepWithHalving(
    full: Float64Array,
    from: Evaluation,
    decrement: number,
  ): { evaluation: Evaluation; hasFallen: boolean } | 'stopped' {
    const before = copyCentres(centres);
    // Moving the quadrature's centres changes the objective a little, which is no fall; and close to the top, where
    // a step gains less than that, Newton's step is taken as it is.
    const slack = decrement < smallGain ? Infinity : 1e-3 + 1e-6 * table.rows;
    let share = cappedShare(full, priors);
    let last = from;
    for (let halving = 0; halving < maxHalvings; halving++, share /= 2) {
      if (options.shouldStop?.()) return 'stopped';
      const move = full.map((value) => value * share);
      moveCellTypes(centres, before, from, move);
      centres.bankModes.set(before.bankModes);
      const tried = evaluate(
        work,
        from.psi.map((value, i) => value + move[i]!),
        priors,
      );
      if (tried.objective >= from.objective - slack) return { evaluation: tried, hasFallen: false };
      last = tried;
    }
    // A step of next to nothing that falls is the quadrature's own doing: with few banks its centres can move the
    // objective more than the slack. Newton goes on from what the new centres say.
    return { evaluation: last, hasFallen: true };
  }
}

function unconverged(reason: string, iterations: number): Maximum {
  return { ok: false, kind: 'unconverged', reason, iterations };
}

/** Share of a Newton step that keeps every parameter within its cap. */
function cappedShare(step: Float64Array, priors: readonly Prior[]): number {
  let share = 1;
  priors.forEach((prior, i) => {
    const isLnSd = i >= at.lnS && i <= at.lnSm;
    const cap = isLnSd ? lnSdCap : priorSdCap * prior.sd;
    share = Math.min(share, cap / Math.max(Math.abs(step[i]!), 1e-300));
  });
  return share;
}

/** delta m = I_mm⁻¹ (score_m - I_m,psi delta psi); the scale follows the information (equation 15). */
function moveCellTypes(centres: Centres, before: Centres, from: Evaluation, move: Float64Array): void {
  const count = move.length;
  for (let k = 0; k < centres.cellTypeModes.length; k++) {
    const information = Math.max(from.cellTypeInformation[k]!, 1e-3);
    let score = from.cellTypeScore[k]!;
    for (let i = 0; i < count; i++) score -= from.cellTypeCross[k * count + i]! * move[i]!;
    const shift = Math.max(-cellTypeCap, Math.min(cellTypeCap, score / information));
    centres.cellTypeModes[k] = before.cellTypeModes[k]! + shift;
    centres.cellTypeScales[k] = Math.min(1, 1 / Math.sqrt(information));
  }
}

function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}
