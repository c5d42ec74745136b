import * as model from './parameters';
import { at } from './parameters';
import * as layout from './workspace';
import type { PoolTable } from './table';
import type { Workspace } from './workspace';

// Copied once: bundlers turn imported constants into property reads, which the inner loops would feel.
const { bankNodes, cellTypeNodes, nodeCount } = layout;
const { tangentFade } = model;
const lnTangent = Math.log(1 - tangentFade);
const tangentSlope = 1 / (1 - tangentFade);
/** At and below this derivative, ln(1 - q) is continued by its tangent. */
export const tangentDerivative = -tangentFade * tangentSlope;
const maxModeSteps = 25;
const stepCap = 0.5;
// A centre this close to the mode, in sd, is as good as the mode for nine nodes.
const modeTolerance = 0.02;

/** GA + GB of each check and GA's share (README equations 3 and 4), into the workspace. */
export function fillGross(work: Workspace, psi: Float64Array): void {
  fillGrossInto(work.table, psi, work.exponent, work.gross, work.calendarShare);
}

/** GA + GB of each check and, when asked for, GA's share of it. */
export function fillGrossInto(
  table: PoolTable,
  psi: Float64Array,
  exponent: number,
  gross: Float64Array,
  calendarShare: Float64Array | null,
): void {
  const { lnYears, lnEfc, lnDepth, lnRate, tau, soc, clamped, extra } = table;
  const [lnA, aT, aS] = [psi[at.lnA]!, psi[at.aT]!, psi[at.aS]!];
  const [lnB, z, bD, bC] = [psi[at.lnB]!, psi[at.z]!, psi[at.bD]!, psi[at.bC]!];
  const [bT, bK] = [psi[at.bT]!, psi[at.bK]!];
  const added = extra ? psi[at.extra]! : 0;
  for (let j = 0; j < table.rows; j++) {
    const calendar = Math.exp(lnA + aT * tau[j]! + aS * soc[j]! + exponent * lnYears[j]!);
    const lnCycling =
      lnB + z * lnEfc[j]! + bD * lnDepth[j]! + bC * lnRate[j]! + bT * tau[j]! + bK * clamped[j]!;
    const cycling = Math.exp(extra ? lnCycling + added * extra[j]! : lnCycling);
    gross[j] = calendar + cycling;
    if (calendarShare) calendarShare[j] = calendar / (calendar + cycling);
  }
}

/** What the integration of one bank needs of psi. */
export interface BankScales {
  c0: number;
  s2: number;
  /** rho = sc² / s². */
  rho: number;
  lnS: number;
  su2: number;
  lnSu: number;
}

export function bankScales(psi: Float64Array): BankScales {
  const s2 = Math.exp(2 * psi[at.lnS]!);
  return {
    c0: psi[at.c0]!,
    s2,
    rho: Math.exp(2 * psi[at.lnSc]!) / s2,
    lnS: psi[at.lnS]!,
    su2: Math.exp(2 * psi[at.lnSu]!),
    lnSu: psi[at.lnSu]!,
  };
}

/**
 * Integrate one bank over its start c (closed form) and its pace u (adaptive Gauss-Hermite), given the cell
 * type's effect m (README equations 5 to 7). Writes v, d, node weights and the log-likelihood.
 * @param bank place in the table
 * @param local place within its cell type
 * @param rowBase first row of the cell type
 */
export function integrateBank(
  work: Workspace,
  scales: BankScales,
  bank: number,
  local: number,
  rowBase: number,
  node: number,
  m: number,
): void {
  const { table, gross, v, d, nodeWeight, nodeU, centres, bankRule } = work;
  const { y, inverseWeight } = table;
  const { c0, s2, rho, su2 } = scales;
  const first = table.bankStart[bank]!;
  const n = table.bankStart[bank + 1]! - first;
  const base = (first - rowBase) * nodeCount + node * bankNodes * n;
  const weightBase = local * nodeCount + node * bankNodes;

  let a = 0;
  let lnWeights = 0;
  let active = 0;
  for (let j = 0; j < n; j++) {
    const inverse = inverseWeight[first + j]!;
    if (inverse === 0) continue;
    a += inverse;
    lnWeights += table.lnWeight[first + j]!;
    active++;
  }
  const kappa = rho / (1 + rho * a);

  // Gauss-Newton to the mode of u; the last curvature gives the scale of the nodes.
  let u = centres.bankModes[bank * cellTypeNodes + node]!;
  let curvature = 1 / su2;
  for (let step = 0; step < maxModeSteps; step++) {
    const pace = Math.exp(m + u);
    let sumR = 0;
    let sumD = 0;
    let sumRD = 0;
    let sumDD = 0;
    let bend = 0;
    let bendR = 0;
    for (let j = 0; j < n; j++) {
      const inverse = inverseWeight[first + j]!;
      if (inverse === 0) continue;
      const q = pace * gross[first + j]!;
      let r: number;
      let slope: number;
      let second: number;
      if (q < tangentFade) {
        r = y[first + j]! - c0 - Math.log(1 - q);
        slope = -q / (1 - q);
        second = slope - slope * slope;
      } else {
        r = y[first + j]! - c0 - lnTangent + (q - tangentFade) * tangentSlope;
        slope = -q * tangentSlope;
        second = slope;
      }
      sumR += r * inverse;
      sumD += slope * inverse;
      sumRD += r * slope * inverse;
      sumDD += slope * slope * inverse;
      bend += second * inverse;
      bendR += r * second * inverse;
    }
    const gradient = (sumRD - kappa * sumR * sumD) / s2 - u / su2;
    const gaussNewton = (sumDD - kappa * sumD * sumD) / s2 + 1 / su2;
    const full = gaussNewton - (bendR - kappa * sumR * bend) / s2;
    curvature = full > 0.2 * gaussNewton ? full : gaussNewton;
    let move = gradient / (full > 0.5 * gaussNewton ? full : gaussNewton);
    if (move > stepCap) move = stepCap;
    else if (move < -stepCap) move = -stepCap;
    u += move;
    if (move * move * curvature < modeTolerance * modeTolerance) break;
  }
  centres.bankModes[bank * cellTypeNodes + node] = u;
  const scale = 1 / Math.sqrt(curvature);

  const rowConstant =
    -0.5 * (active * (Math.log(2 * Math.PI) + 2 * scales.lnS) + lnWeights + Math.log(1 + rho * a)) -
    0.5 * Math.log(2 * Math.PI) -
    scales.lnSu +
    Math.log(scale);
  let largest = -Infinity;
  for (let k = 0; k < bankNodes; k++) {
    const at = u + scale * bankRule.nodes[k]!;
    const pace = Math.exp(m + at);
    const place = base + k * n;
    let sumR = 0;
    let sumR2 = 0;
    for (let j = 0; j < n; j++) {
      const q = pace * gross[first + j]!;
      let r: number;
      if (q < tangentFade) {
        const left = 1 - q;
        r = y[first + j]! - c0 - Math.log(left);
        d[place + j] = -q / left;
      } else {
        r = y[first + j]! - c0 - lnTangent + (q - tangentFade) * tangentSlope;
        d[place + j] = -q * tangentSlope;
      }
      const weighted = r * inverseWeight[first + j]!;
      sumR += weighted;
      sumR2 += weighted * r;
      v[place + j] = r;
    }
    const shift = kappa * sumR;
    for (let j = 0; j < n; j++) v[place + j] = ((v[place + j]! - shift) * inverseWeight[first + j]!) / s2;
    const value =
      bankRule.logWeights[k]! - (0.5 * (sumR2 - kappa * sumR * sumR)) / s2 - (0.5 * at * at) / su2;
    nodeWeight[weightBase + k] = value;
    nodeU[weightBase + k] = at;
    if (value > largest) largest = value;
  }
  let total = 0;
  for (let k = 0; k < bankNodes; k++) {
    const weight = Math.exp(nodeWeight[weightBase + k]! - largest);
    nodeWeight[weightBase + k] = weight;
    total += weight;
  }
  for (let k = 0; k < bankNodes; k++) nodeWeight[weightBase + k]! /= total;
  work.bankLogLikelihood[local * cellTypeNodes + node] = rowConstant + largest + Math.log(total);
  work.sumInverseWeight[local] = a;
  work.activeCount[local] = active;
}
