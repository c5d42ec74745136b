import { levenbergMarquardt } from 'ml-levenberg-marquardt';
import { Matrix } from 'ml-matrix';
import {
  boundsReached,
  evaluate,
  inverseInformation,
  polish,
  project,
  type PolishResult,
  type SearchState,
  type WhitenedProblem,
} from './gaussNewton';

/** A weighted nonlinear least-squares problem: minimise sum(((observed - model) / sd)^2). */
export interface LeastSquaresProblem {
  observed: ArrayLike<number>;
  /** Model value at the i-th observation, for given parameters. */
  model: (parameters: readonly number[]) => (index: number) => number;
  /** Partial derivatives at the i-th observation; central differences when left out. */
  gradient?: (parameters: readonly number[]) => (index: number) => readonly number[];
  /** Standard deviation of each observation, up to a common factor; 1 when left out. */
  sd?: ArrayLike<number>;
}

export interface LeastSquaresOptions {
  start: readonly number[];
  lower?: readonly number[];
  upper?: readonly number[];
}

export interface LeastSquaresSolution {
  ok: true;
  parameters: number[];
  /** sigma^2 (J'WJ)^-1 over the parameters not on a bound; zero rows for those on one. */
  covariance: number[][];
  standardErrors: number[];
  /** Weighted residual sum of squares. */
  residualSumOfSquares: number;
  /** sqrt(rss / degreesOfFreedom), relative to `sd`; NaN without degrees of freedom. */
  residualSd: number;
  degreesOfFreedom: number;
  /** Which bound each parameter ended on, or null. */
  bounds: ('lower' | 'upper' | null)[];
  iterations: number;
}

export type LeastSquaresResult =
  LeastSquaresSolution | { ok: false; reason: 'notConverged' | 'singular' | 'badStart' };

const BURST_ITERATIONS = 12;
const MAX_BURSTS = 12;
const WORTH_ANOTHER_BURST = 0.01;
// The package takes every step, good or bad; a search that got lost is begun again with others.
const DAMPINGS = [0.1, 100, 1e-4];
// Central differences: error of order h^2 + eps/h is smallest near the cube root of eps.
const DIFFERENCE_STEP = 6e-6;

/**
 * Weighted nonlinear least squares: bursts of a damped search by ml-levenberg-marquardt, then
 * Gauss-Newton steps by QR, because the package stops after a number of iterations and has no test
 * of convergence. Residuals are divided by `sd` before the package sees them (its own `weights` are
 * applied one way to the gradient and the other way to the Hessian in 5.1.0), and parameters are
 * scaled so that each column of the Jacobian has length 1 (its damping is absolute).
 *
 * Throws RangeError on mismatched lengths. Returns `{ ok: false }` when the search does not settle.
 */
export function leastSquares(problem: LeastSquaresProblem, options: LeastSquaresOptions): LeastSquaresResult {
  const whitened = whiten(problem, options);
  const start = evaluate(whitened, project(whitened, options.start));
  if (!Number.isFinite(start.rss)) return { ok: false, reason: 'badStart' };
  for (const damping of DAMPINGS) {
    const found = searchFrom(whitened, start, damping);
    if (found.hasConverged) return solution(whitened, found.state, found.steps);
  }
  return { ok: false, reason: 'notConverged' };
}

function searchFrom(problem: WhitenedProblem, start: SearchState, firstDamping: number): PolishResult {
  let best = start;
  let steps = 0;
  let damping = firstDamping;
  for (let burst = 0; burst < MAX_BURSTS; burst++) {
    const searched = evaluate(problem, dampedSearch(problem, best, damping));
    steps += BURST_ITERATIONS;
    const gained = 1 - searched.rss / best.rss;
    if (gained > 0) best = searched;
    damping = gained > 0 ? Math.max(damping / 10, 1e-7) : damping * 30;
    if (gained > WORTH_ANOTHER_BURST) continue;
    const polished = polish(problem, best);
    steps += polished.steps;
    best = polished.state;
    if (polished.hasConverged) return { ...polished, steps };
  }
  return { state: best, hasConverged: false, steps };
}

function whiten(problem: LeastSquaresProblem, options: LeastSquaresOptions): WhitenedProblem {
  const { observed, model, gradient, sd } = problem;
  const size = observed.length;
  const count = options.start.length;
  if (size < count) throw new RangeError('leastSquares requires at least as many observations as parameters');
  for (const [name, values, length] of [
    ['sd', sd, size],
    ['lower', options.lower, count],
    ['upper', options.upper, count],
  ] as const) {
    if (values && values.length !== length)
      throw new RangeError(`leastSquares requires ${length} values of ${name}`);
  }
  const y = Float64Array.from(observed);
  const weight = Float64Array.from({ length: size }, (_, i) => 1 / (sd?.[i] ?? 1));
  if (!weight.every((value) => value > 0 && Number.isFinite(value))) {
    throw new RangeError('leastSquares requires positive, finite sd');
  }
  const fitted = (parameters: readonly number[]) => {
    const at = model(parameters);
    return Float64Array.from({ length: size }, (_, i) => at(i) * (weight[i] as number));
  };
  return {
    size,
    residuals: (parameters) => {
      const at = model(parameters);
      return Float64Array.from(y, (value, i) => (value - at(i)) * (weight[i] as number));
    },
    jacobian: (parameters) =>
      gradient
        ? rowsOf(size, count, gradient(parameters), weight)
        : centralDifferences(size, fitted, parameters),
    observedNorm: Math.hypot(...y.map((value, i) => value * (weight[i] as number))),
    lower: options.lower ?? [],
    upper: options.upper ?? [],
  };
}

function rowsOf(
  size: number,
  count: number,
  at: (index: number) => readonly number[],
  weight: Float64Array,
): Matrix {
  const jacobian = new Matrix(size, count);
  for (let i = 0; i < size; i++) {
    const partials = at(i);
    for (let j = 0; j < count; j++) jacobian.set(i, j, (partials[j] as number) * (weight[i] as number));
  }
  return jacobian;
}

function centralDifferences(
  size: number,
  fitted: (parameters: readonly number[]) => Float64Array,
  parameters: readonly number[],
): Matrix {
  const jacobian = new Matrix(size, parameters.length);
  parameters.forEach((value, j) => {
    const step = DIFFERENCE_STEP * (Math.abs(value) || 1e-3);
    const above = parameters.map((other, k) => (k === j ? value + step : other));
    const below = parameters.map((other, k) => (k === j ? value - step : other));
    const [upper, lower] = [fitted(above), fitted(below)];
    const span = (above[j] as number) - (below[j] as number);
    for (let i = 0; i < size; i++) jacobian.set(i, j, ((upper[i] as number) - (lower[i] as number)) / span);
  });
  return jacobian;
}

function dampedSearch(problem: WhitenedProblem, from: SearchState, damping: number): number[] {
  const jacobian = problem.jacobian(from.parameters);
  const scales = from.parameters.map((_, j) => jacobian.getColumnVector(j).norm() || 1);
  if (!scales.every(Number.isFinite)) return from.parameters;
  const unscaled = (scaled: readonly number[]) => scaled.map((value, j) => value / (scales[j] as number));
  const toScaled = (values: readonly number[], open: number) =>
    scales.map((scale, j) => (values[j] ?? open) * scale);
  const positions = Float64Array.from({ length: problem.size }, (_, i) => i);
  const zeros = new Float64Array(problem.size);
  try {
    const found = levenbergMarquardt(
      { x: positions, y: zeros },
      (scaled) => {
        const residuals = problem.residuals(unscaled(scaled));
        return (i) => -(residuals[i] as number);
      },
      {
        initialValues: toScaled(from.parameters, 0),
        minValues: toScaled(problem.lower, -Infinity),
        maxValues: toScaled(problem.upper, Infinity),
        damping,
        maxIterations: BURST_ITERATIONS,
        errorTolerance: 0,
        jacobianFunction: (scaled) => {
          const rows = problem.jacobian(unscaled(scaled));
          return (i) => scales.map((scale, j) => rows.get(i, j) / scale);
        },
      },
    );
    return project(problem, unscaled(found.parameterValues));
  } catch {
    // The package throws when its normal matrix cannot be inverted; the caller raises the damping.
    return from.parameters;
  }
}

function solution(problem: WhitenedProblem, state: SearchState, iterations: number): LeastSquaresResult {
  const bounds = boundsReached(problem, state.parameters);
  const free = bounds.flatMap((bound, j) => (bound === null ? [j] : []));
  const degreesOfFreedom = problem.size - free.length;
  const variance = degreesOfFreedom > 0 ? state.rss / degreesOfFreedom : NaN;
  const covariance = bounds.map(() => bounds.map(() => 0));
  if (free.length > 0) {
    const inverse = inverseInformation(problem.jacobian(state.parameters), free);
    if (inverse === null) return { ok: false, reason: 'singular' };
    free.forEach((j, a) =>
      free.forEach((k, b) => {
        (covariance[j] as number[])[k] = inverse.get(a, b) * variance;
      }),
    );
  }
  return {
    ok: true,
    parameters: state.parameters,
    covariance,
    standardErrors: covariance.map((row, j) => Math.sqrt(row[j] as number)),
    residualSumOfSquares: state.rss,
    residualSd: Math.sqrt(variance),
    degreesOfFreedom,
    bounds,
    iterations,
  };
}
