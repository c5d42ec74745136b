import { Matrix, QrDecomposition } from 'ml-matrix';

/** Residuals already divided by their sd, and their derivatives, on a box of parameters. */
export interface WhitenedProblem {
  size: number;
  residuals: (parameters: readonly number[]) => Float64Array;
  /** size x parameters: derivatives of the whitened model (not of the residuals). */
  jacobian: (parameters: readonly number[]) => Matrix;
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

const MAX_STEPS = 50;
const MAX_HALVINGS = 25;
// Relative offset (Bates and Watts 1981, Technometrics 23, 179-183): length of the step still to go,
// as a share of what the model cannot reach.
const OFFSET_GOAL = 1e-10;
// Where rounding lets the sum of squares fall no further, this much offset is accepted.
const OFFSET_AT_ROUNDING = 1e-5;
const STEP_GOAL = 1e-13;

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

/** Gauss-Newton by QR with step halving; a parameter on its bound moves only inwards. */
export function polish(problem: WhitenedProblem, start: SearchState): PolishResult {
  let state = start;
  for (let steps = 0; steps < MAX_STEPS; steps++) {
    const free = freeParameters(problem, state);
    if (free.length === 0) return { state, hasConverged: true, steps };
    const step = gaussNewtonStep(problem, state, free);
    if (step === null) return { state, hasConverged: false, steps };
    if (step.offset < OFFSET_GOAL || step.relativeLength < STEP_GOAL) {
      return { state, hasConverged: true, steps };
    }
    const next = halvedStep(problem, state, step.delta);
    if (next === null) return { state, hasConverged: step.offset < OFFSET_AT_ROUNDING, steps };
    state = next;
  }
  return { state, hasConverged: false, steps: MAX_STEPS };
}

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
function freeParameters(problem: WhitenedProblem, state: SearchState): number[] {
  const reached = boundsReached(problem, state.parameters);
  if (reached.every((bound) => bound === null)) return state.parameters.map((_, j) => j);
  const jacobian = problem.jacobian(state.parameters);
  return state.parameters.flatMap((_, j) => {
    const bound = reached[j];
    if (bound === null) return [j];
    let descent = 0;
    for (let i = 0; i < problem.size; i++) descent += jacobian.get(i, j) * (state.residuals[i] as number);
    return (bound === 'lower') === descent > 0 ? [j] : [];
  });
}

function gaussNewtonStep(problem: WhitenedProblem, state: SearchState, free: readonly number[]) {
  const jacobian = problem.jacobian(state.parameters);
  const scales = free.map((j) => jacobian.getColumnVector(j).norm());
  if (!scales.every((scale) => scale > 0 && Number.isFinite(scale))) return null;
  const scaled = scaledColumns(jacobian, free, scales);
  const qr = new QrDecomposition(scaled);
  if (!qr.isFullRank()) return null;
  const target = Matrix.columnVector(state.residuals);
  const solution = qr.solve(target);
  const fitted = scaled.mmul(solution);
  const explained = fitted.norm() ** 2;
  const unexplained = Math.max(state.rss - explained, 0);
  const delta = state.parameters.map(() => 0);
  let relativeLength = 0;
  free.forEach((j, a) => {
    const change = solution.get(a, 0) / (scales[a] as number);
    delta[j] = change;
    relativeLength = Math.max(
      relativeLength,
      Math.abs(change) / (Math.abs(state.parameters[j] as number) + 1e-300),
    );
  });
  return { delta, relativeLength, offset: Math.sqrt(explained / (unexplained + 1e-300)) };
}

function halvedStep(
  problem: WhitenedProblem,
  state: SearchState,
  delta: readonly number[],
): SearchState | null {
  let share = 1;
  for (let halving = 0; halving < MAX_HALVINGS; halving++) {
    const parameters = project(
      problem,
      state.parameters.map((value, j) => value + share * (delta[j] as number)),
    );
    const next = evaluate(problem, parameters);
    if (next.rss < state.rss) return next;
    share /= 2;
  }
  return null;
}
