import { Matrix, QrDecomposition } from 'ml-matrix';

/** Residuals already divided by their sd, and their derivatives, on a box of parameters. */
export interface WhitenedProblem {
  size: number;
  residuals: (parameters: readonly number[]) => Float64Array;
  /** size x parameters: derivatives of the whitened model (not of the residuals). */
  jacobian: (parameters: readonly number[]) => Matrix;
  /** Length of the whitened observations: the scale of rounding. */
  observedNorm: number;
  lower: readonly number[];
  upper: readonly number[];
}

export interface SearchState {
  parameters: number[];
  residuals: Float64Array;
  rss: number;
}

export interface PolishResult {
  state: SearchState;
  hasConverged: boolean;
  steps: number;
}

const MAX_STEPS = 200;
// Relative offset (Bates and Watts 1981, Technometrics 23, 179-183): length of the step still to go,
// as a share of what the model cannot reach.
const OFFSET_GOAL = 1e-10;
// From here on full steps are taken for as long as the offset falls: rounding hides the sum of squares.
const OFFSET_NEAR = 1e-5;
const STEP_GOAL = 1e-13;
// A step that would change the fitted values by less than their rounding.
const ROUNDING = 16 * Number.EPSILON;
const FIRST_DAMPING = 1e-3;
const MAX_DAMPING = 1e10;
const MAX_RELATIVE_STEP = 2;

export function evaluate(problem: WhitenedProblem, parameters: number[]): SearchState {
  const residuals = problem.residuals(parameters);
  let rss = 0;
  for (const residual of residuals) rss += residual * residual;
  return { parameters, residuals, rss: Number.isFinite(rss) ? rss : Infinity };
}

/** Moves parameters into the box. */
export function project(problem: WhitenedProblem, parameters: readonly number[]): number[] {
  return parameters.map((value, j) =>
    Math.min(Math.max(value, problem.lower[j] ?? -Infinity), problem.upper[j] ?? Infinity),
  );
}

/** Which bound each parameter lies on, or null. */
export function boundsReached(
  problem: WhitenedProblem,
  parameters: readonly number[],
): ('lower' | 'upper' | null)[] {
  return parameters.map((value, j) => {
    if (value <= (problem.lower[j] ?? -Infinity)) return 'lower';
    return value >= (problem.upper[j] ?? Infinity) ? 'upper' : null;
  });
}

/**
 * Gauss-Newton by QR, damped (Levenberg 1944, Marquardt 1963) only while plain steps do not lower the
 * sum of squares. A parameter on its bound moves only inwards.
 */
export function polish(problem: WhitenedProblem, start: SearchState): PolishResult {
  let state = start;
  let damping = FIRST_DAMPING;
  for (let steps = 0; steps < MAX_STEPS; steps++) {
    const linear = linearise(problem, state);
    if (linear === null) return { state, hasConverged: false, steps };
    if (hasArrived(problem, linear)) return { state, hasConverged: true, steps };
    if (linear.offset < OFFSET_NEAR) {
      return { state: settle(problem, state, linear), hasConverged: true, steps };
    }
    let next: SearchState | null = null;
    while (next === null && damping <= MAX_DAMPING) {
      const delta = damping === 0 ? linear.delta : dampedDelta(linear, state, damping);
      const tried = moved(problem, state, shortened(problem, state, linear, delta));
      if (tried.rss < state.rss) next = tried;
      else damping = damping === 0 ? FIRST_DAMPING : damping * 10;
    }
    if (next === null) return { state, hasConverged: false, steps };
    damping = damping < FIRST_DAMPING ? 0 : damping / 10;
    state = next;
  }
  return { state, hasConverged: false, steps: MAX_STEPS };
}

// Near the minimum the offset still falls where the sum of squares no longer can; stop when it stalls.
function settle(problem: WhitenedProblem, start: SearchState, from: Linearised): SearchState {
  let [state, linear] = [start, from];
  for (;;) {
    const next = moved(problem, state, linear.delta);
    const nextLinear = linearise(problem, next);
    if (nextLinear === null || !(nextLinear.offset < 0.9 * linear.offset)) return state;
    [state, linear] = [next, nextLinear];
    if (hasArrived(problem, linear)) return state;
  }
}

// A step of more than the parameters' own size trusts the linear model too far (as in MINPACK's lmder).
function shortened(
  problem: WhitenedProblem,
  state: SearchState,
  { free, scales }: Linearised,
  delta: readonly number[],
): number[] {
  const length = (values: readonly number[]) =>
    Math.hypot(...free.map((j, a) => (values[j] as number) * (scales[a] as number)));
  const longest = MAX_RELATIVE_STEP * Math.max(length(state.parameters), 1e-3 * problem.observedNorm);
  const share = Math.min(1, longest / length(delta));
  return delta.map((value) => value * share);
}

const hasArrived = (problem: WhitenedProblem, { offset, relativeLength, change }: Linearised) =>
  offset < OFFSET_GOAL || relativeLength < STEP_GOAL || change <= ROUNDING * problem.observedNorm;

/** (J'J)^-1 over the given columns, or null when they are dependent. */
export function inverseInformation(jacobian: Matrix, columns: readonly number[]): Matrix | null {
  const scales = columns.map((j) => jacobian.getColumnVector(j).norm());
  if (scales.some((scale) => !(scale > 0))) return null;
  const scaled = scaledColumns(jacobian, columns, scales);
  const qr = new QrDecomposition(scaled);
  if (!qr.isFullRank()) return null;
  const k = columns.length;
  const solved = solveUpper(qr.upperTriangularMatrix, Matrix.identity(k));
  const covariance = solved.mmul(solved.transpose());
  for (let a = 0; a < k; a++) {
    for (let b = 0; b < k; b++) {
      covariance.set(a, b, covariance.get(a, b) / ((scales[a] as number) * (scales[b] as number)));
    }
  }
  return covariance;
}

function scaledColumns(jacobian: Matrix, columns: readonly number[], scales: readonly number[]): Matrix {
  const scaled = new Matrix(jacobian.rows, columns.length);
  columns.forEach((j, a) => {
    const scale = scales[a] as number;
    for (let i = 0; i < jacobian.rows; i++) scaled.set(i, a, jacobian.get(i, j) / scale);
  });
  return scaled;
}

function solveUpper(upper: Matrix, right: Matrix): Matrix {
  const solved = right.clone();
  for (let column = 0; column < right.columns; column++) {
    for (let i = upper.rows - 1; i >= 0; i--) {
      let value = solved.get(i, column);
      for (let j = i + 1; j < upper.rows; j++) value -= upper.get(i, j) * solved.get(j, column);
      solved.set(i, column, value / upper.get(i, i));
    }
  }
  return solved;
}

// A parameter on its bound is held when the descent direction points out of the box.
function freeParameters(problem: WhitenedProblem, state: SearchState, jacobian: Matrix): number[] {
  const reached = boundsReached(problem, state.parameters);
  if (reached.every((bound) => bound === null)) return state.parameters.map((_, j) => j);
  return state.parameters.flatMap((_, j) => {
    const bound = reached[j];
    if (bound === null) return [j];
    let descent = 0;
    for (let i = 0; i < problem.size; i++) descent += jacobian.get(i, j) * (state.residuals[i] as number);
    return (bound === 'lower') === descent > 0 ? [j] : [];
  });
}

interface Linearised {
  /** Parameters that may move, their scales, and the Jacobian with columns of length 1. */
  free: number[];
  scales: number[];
  scaled: Matrix;
  /** Plain Gauss-Newton step, over all parameters. */
  delta: number[];
  /** Length of the change of the fitted values that the step promises. */
  change: number;
  offset: number;
  relativeLength: number;
}

function linearise(problem: WhitenedProblem, state: SearchState): Linearised | null {
  const jacobian = problem.jacobian(state.parameters);
  const free = freeParameters(problem, state, jacobian);
  const scales = free.map((j) => jacobian.getColumnVector(j).norm());
  if (!scales.every((scale) => scale > 0 && Number.isFinite(scale))) return null;
  const scaled = scaledColumns(jacobian, free, scales);
  const none = { free, scales, scaled, delta: state.parameters.map(() => 0) };
  if (free.length === 0) return { ...none, change: 0, offset: 0, relativeLength: 0 };
  const qr = new QrDecomposition(scaled);
  if (!qr.isFullRank()) return null;
  const solution = qr.solve(Matrix.columnVector(state.residuals));
  const change = scaled.mmul(solution).norm();
  const unexplained = Math.sqrt(Math.max(state.rss - change * change, 0));
  const delta = spread(free, scales, solution, state);
  const relativeLength = Math.max(
    ...free.map((j) => Math.abs(delta[j] as number) / (Math.abs(state.parameters[j] as number) + 1e-300)),
  );
  return { ...none, delta, change, offset: change / (unexplained + 1e-300), relativeLength };
}

// Damping as extra rows below the Jacobian, so that the normal equations are never formed.
function dampedDelta({ free, scales, scaled }: Linearised, state: SearchState, damping: number): number[] {
  const count = free.length;
  const rows = new Matrix(scaled.rows + count, count);
  rows.setSubMatrix(scaled, 0, 0);
  for (let a = 0; a < count; a++) rows.set(scaled.rows + a, a, Math.sqrt(damping));
  const target = new Matrix(scaled.rows + count, 1);
  state.residuals.forEach((residual, i) => target.set(i, 0, residual));
  return spread(free, scales, new QrDecomposition(rows).solve(target), state);
}

function spread(
  free: readonly number[],
  scales: readonly number[],
  solution: Matrix,
  state: SearchState,
): number[] {
  const delta = state.parameters.map(() => 0);
  free.forEach((j, a) => {
    delta[j] = solution.get(a, 0) / (scales[a] as number);
  });
  return delta;
}

function moved(problem: WhitenedProblem, state: SearchState, delta: readonly number[]): SearchState {
  return evaluate(
    problem,
    project(
      problem,
      state.parameters.map((value, j) => value + (delta[j] as number)),
    ),
  );
}
