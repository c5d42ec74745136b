/** Nodes and log weights of Gauss-Hermite quadrature against the standard normal density. */
export interface HermiteRule {
  nodes: Float64Array;
  /** ln(weight) + node²/2 + ln(2 pi)/2: what turns a sum over nodes into an integral of any function. */
  logWeights: Float64Array;
}

/**
 * Gauss-Hermite rule for the standard normal density, by Newton's method on the orthonormal Hermite
 * recurrence h_{k+1} = (x h_k - sqrt(k) h_{k-1}) / sqrt(k+1) (Golub & Welsch's nodes, found without a matrix).
 * Exact for polynomials to degree 2 count - 1. An integral of g is scale * sum exp(logWeights) g(centre + scale * node).
 * @param count number of nodes, 1..40
 * @throws RangeError when count is not a whole number in that range
 */
export function hermiteRule(count: number): HermiteRule {
  if (!Number.isInteger(count) || count < 1 || count > 40) {
    throw new RangeError('hermiteRule requires 1 to 40 nodes');
  }
  const nodes = new Float64Array(count);
  const logWeights = new Float64Array(count);
  const roots = rootsByInterlacing(count);
  for (let k = 0; k < count; k++) {
    const x = roots[k]!;
    const previous = hermite(count - 1, x);
    // Weight of a root of h_n: 1 / (n h_{n-1}(x)²) for orthonormal h.
    nodes[k] = x;
    logWeights[k] = -Math.log(count * previous * previous) + (x * x) / 2 + 0.5 * Math.log(2 * Math.PI);
  }
  return { nodes, logWeights };
}

/** Orthonormal Hermite polynomial of a degree at x. */
function hermite(degree: number, x: number): number {
  let before = 0;
  let current = 1;
  for (let k = 0; k < degree; k++) {
    const next = (x * current - Math.sqrt(k) * before) / Math.sqrt(k + 1);
    before = current;
    current = next;
  }
  return current;
}

/** The roots of degree n lie one between each two of degree n - 1, so bisection finds all of them. */
function rootsByInterlacing(count: number): number[] {
  let roots: number[] = [];
  for (let degree = 1; degree <= count; degree++) {
    const bound = 2 * Math.sqrt(degree) + 1;
    const edges = [-bound, ...roots, bound];
    roots = edges.slice(1).map((upper, k) => bisectRoot(degree, edges[k]!, upper));
  }
  return roots;
}

function bisectRoot(degree: number, from: number, to: number): number {
  let low = from;
  let high = to;
  const signLow = Math.sign(hermite(degree, low + 1e-12 * (high - low)));
  for (let i = 0; i < 200 && high - low > 1e-15 * (1 + Math.abs(low)); i++) {
    const middle = 0.5 * (low + high);
    if (middle === low || middle === high) break;
    if (Math.sign(hermite(degree, middle)) === signLow) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
