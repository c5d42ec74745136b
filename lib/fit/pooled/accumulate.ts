import * as nodes from './bankNodes';
import * as layout from './workspace';
import * as model from './parameters';
import type { BankScales } from './bankNodes';
import type { Workspace } from './workspace';

// Copied once: bundlers turn imported constants into property reads, which the inner loops would feel.
const { bankNodes, cellTypeNodes, centreNode, nodeCount, reducedExtras } = layout;
const { tangentDerivative } = nodes;
const { at, calendarCount } = model;

/** Sums of one cell type over its banks, per node of its effect. */
export interface CellTypeSums {
  /** 3 x parameters: posterior mean of the score at each node of m. */
  scores: Float64Array;
  /** At the middle node: score and information of m, and its cross information with psi. */
  scoreM: number;
  informationM: number;
  crossM: Float64Array;
}

/**
 * Add one bank to score and information (README equations 8 to 12). Everything is summed first in the bank's own
 * reduced coordinates (its checks, then c0, ln s, ln sc, ln su) and brought to psi once.
 * @param information parameters x parameters, upper triangle is written
 * @param outerWeights posterior weights of the three nodes of the cell type's effect
 */
export function accumulateBank(
  work: Workspace,
  scales: BankScales,
  bank: number,
  local: number,
  rowBase: number,
  outerWeights: Float64Array,
  information: Float64Array,
  sums: CellTypeSums,
): void {
  const { table, reduced, reducedAtNode, scoreMean, scoreAtNode } = work;
  const first = table.bankStart[bank]!;
  const n = table.bankStart[bank + 1]! - first;
  const width = n + reducedExtras;
  const size = width * width;
  fillDesign(work, first, n);
  reduced.fill(0, 0, size);
  scoreMean.fill(0, 0, width);
  for (let node = 0; node < cellTypeNodes; node++) {
    nodeSums(work, scales, bank, local, rowBase, node);
    addScores(work, n, scoreAtNode, sums.scores, node * work.parameterCount);
    if (node === centreNode) {
      addCross(work, n, sums);
      work.scoreAtCentre.set(scoreAtNode.subarray(0, width));
    }
    const outer = outerWeights[node]!;
    for (let i = 0; i < size; i++) reduced[i]! += outer * reducedAtNode[i]!;
    for (let i = 0; i < width; i++) scoreMean[i]! += outer * scoreAtNode[i]!;
  }
  addInformation(work, first, n, information);
  if (work.bankScores) keepBankScore(work, n, work.bankScores, bank * (work.parameterCount + 1));
}

/**
 * Regressors of ln q: row j holds calendarShare x (1, tau, S) and cyclingShare x (1, ln n, ln D, ln C, tau, K[, x]),
 * so that dln(1-q)/dtheta is d times this row (equation 8).
 */
function fillDesign(work: Workspace, first: number, n: number): void {
  const { table, design, thetaCount, calendarShare } = work;
  for (let j = 0; j < n; j++) {
    const row = first + j;
    const place = j * thetaCount;
    const calendar = calendarShare[row]!;
    const cycling = 1 - calendar;
    design[place] = calendar;
    design[place + 1] = calendar * table.tau[row]!;
    design[place + 2] = calendar * table.soc[row]!;
    design[place + 3] = cycling;
    design[place + 4] = cycling * table.lnEfc[row]!;
    design[place + 5] = cycling * table.lnDepth[row]!;
    design[place + 6] = cycling * table.lnRate[row]!;
    design[place + 7] = cycling * table.tau[row]!;
    design[place + 8] = cycling * table.clamped[row]!;
    if (table.extra) design[place + 9] = cycling * table.extra[row]!;
  }
}

/** Score and Louis information of one bank at one node of m, in reduced coordinates (equations 9 to 11). */
function nodeSums(
  work: Workspace,
  scales: BankScales,
  bank: number,
  local: number,
  rowBase: number,
  node: number,
): void {
  const { table, v, d, nodeWeight, nodeU, leverage } = work;
  const { reducedAtNode: info, scoreAtNode: mean } = work;
  const { s2, rho, su2 } = scales;
  const first = table.bankStart[bank]!;
  const n = table.bankStart[bank + 1]! - first;
  const width = n + reducedExtras;
  const [iC0, iS, iSc, iSu] = [n, n + 1, n + 2, n + 3];
  const a = work.sumInverseWeight[local]!;
  const active = work.activeCount[local]!;
  const kappa = rho / (1 + rho * a);
  const free = 1 - kappa * a;
  const sc2 = rho * s2;
  const precision = (a * free) / s2;
  const score = work.product;
  info.fill(0, 0, width * width);
  mean.fill(0, 0, width);
  for (let k = 0; k < bankNodes; k++) {
    const weight = nodeWeight[local * nodeCount + node * bankNodes + k]!;
    const place = (first - rowBase) * nodeCount + (node * bankNodes + k) * n;
    let total = 0;
    let quadratic = 0;
    for (let j = 0; j < n; j++) {
      const vj = v[place + j]!;
      const dj = d[place + j]!;
      total += vj;
      quadratic += vj * vj * table.weight[first + j]!;
      score[j] = vj * dj;
      leverage[j] = table.inverseWeight[first + j]! * dj;
    }
    const u = nodeU[local * nodeCount + node * bankNodes + k]!;
    const total2 = total * total;
    const scoreS = s2 * quadratic - (active - kappa * a);
    const scoreSc = sc2 * (total2 - precision);
    const scoreSu = (u * u) / su2 - 1;
    const rankOne = (weight * kappa) / s2;
    for (let j = 0; j < n; j++) {
      const g = score[j]!;
      const e = leverage[j]!;
      const row = j * width;
      const weightedG = weight * g;
      const weightedE = rankOne * e;
      for (let i = j; i < n; i++) info[row + i]! -= weightedE * leverage[i]! + weightedG * score[i]!;
      const dj = d[place + j]!;
      info[row + j]! += weight * dj * (e / s2 + (dj <= tangentDerivative ? 0 : g));
      info[row + iC0]! += weight * ((free / s2) * e - g * total);
      info[row + iS]! += weight * (2 * (g - kappa * total * e) - g * scoreS);
      info[row + iSc]! += weight * (2 * rho * free * total * e - g * scoreSc);
      info[row + iSu]! -= weightedG * scoreSu;
      mean[j]! += weightedG;
    }
    mean[iC0]! += weight * total;
    mean[iS]! += weight * scoreS;
    mean[iSc]! += weight * scoreSc;
    mean[iSu]! += weight * scoreSu;
    info[iC0 * width + iC0]! += weight * (precision - total2);
    info[iC0 * width + iS]! += weight * total * (2 * free - scoreS);
    info[iC0 * width + iSc]! += weight * total * (2 * sc2 * precision - scoreSc);
    info[iC0 * width + iSu]! -= weight * total * scoreSu;
    info[iS * width + iS]! +=
      weight * (2 * kappa * a * free + 2 * s2 * quadratic - 4 * s2 * kappa * total2 - scoreS * scoreS);
    info[iS * width + iSc]! +=
      weight * (4 * sc2 * free * total2 - 2 * rho * free * free * a - scoreS * scoreSc);
    info[iS * width + iSu]! -= weight * scoreS * scoreSu;
    info[iSc * width + iSc]! +=
      weight *
      (2 * sc2 * (precision - total2) +
        2 * sc2 * sc2 * precision * (2 * total2 - precision) -
        scoreSc * scoreSc);
    info[iSc * width + iSu]! -= weight * scoreSc * scoreSu;
    info[iSu * width + iSu]! += weight * ((2 * u * u) / su2 - scoreSu * scoreSu);
  }
  for (let i = 0; i < width; i++) {
    for (let j = i; j < width; j++) info[i * width + j]! += mean[i]! * mean[j]!;
  }
}

/** The bank's own score, for the influence of banks: its mean over the nodes, and the score of m in its middle. */
function keepBankScore(work: Workspace, n: number, scores: Float64Array, offset: number): void {
  const { scoreMean, scoreAtCentre } = work;
  scores.fill(0, offset, offset + work.parameterCount + 1);
  addScores(work, n, scoreMean, scores, offset);
  for (let j = 0; j < n; j++) scores[offset + work.parameterCount]! += scoreAtCentre[j]!;
}

/** A score in reduced coordinates, brought to psi and added. */
function addScores(
  work: Workspace,
  n: number,
  reducedScore: Float64Array,
  scores: Float64Array,
  offset: number,
): void {
  const { design, thetaCount, thetaIndex } = work;
  for (let j = 0; j < n; j++) {
    const g = reducedScore[j]!;
    for (let t = 0; t < thetaCount; t++) scores[offset + thetaIndex[t]!]! += g * design[j * thetaCount + t]!;
  }
  scores[offset + at.c0]! += reducedScore[n]!;
  scores[offset + at.lnS]! += reducedScore[n + 1]!;
  scores[offset + at.lnSc]! += reducedScore[n + 2]!;
  scores[offset + at.lnSu]! += reducedScore[n + 3]!;
}

/** Score and information of m at its middle node: m moves every check's ln q by one (equation 12). */
function addCross(work: Workspace, n: number, sums: CellTypeSums): void {
  const { reducedAtNode: info, scoreAtNode: mean, design, thetaCount, thetaIndex } = work;
  const width = n + reducedExtras;
  for (let j = 0; j < n; j++) {
    let across = -mean[j]!;
    for (let i = 0; i < n; i++) across += i < j ? info[i * width + j]! : info[j * width + i]!;
    for (let t = 0; t < thetaCount; t++) sums.crossM[thetaIndex[t]!]! += across * design[j * thetaCount + t]!;
    sums.informationM += across;
    sums.scoreM += mean[j]!;
    sums.crossM[at.c0]! += info[j * width + n]!;
    sums.crossM[at.lnS]! += info[j * width + n + 1]!;
    sums.crossM[at.lnSc]! += info[j * width + n + 2]!;
    sums.crossM[at.lnSu]! += info[j * width + n + 3]!;
  }
}

/** The bank's information over all nodes, brought from reduced coordinates to psi (equation 11). */
function addInformation(work: Workspace, first: number, n: number, information: Float64Array): void {
  const { reduced, scoreMean, design, product, thetaCount, thetaIndex, parameterCount: count } = work;
  const width = n + reducedExtras;
  for (let j = 0; j < n; j++) {
    for (let t = 0; t < thetaCount; t++) {
      let sum = 0;
      for (let i = 0; i < n; i++) {
        sum += (i < j ? reduced[i * width + j]! : reduced[j * width + i]!) * design[i * thetaCount + t]!;
      }
      product[j * thetaCount + t] = sum;
    }
  }
  for (let t = 0; t < thetaCount; t++) {
    const pt = thetaIndex[t]!;
    for (let w = t; w < thetaCount; w++) {
      let sum = 0;
      for (let j = 0; j < n; j++) sum += design[j * thetaCount + t]! * product[j * thetaCount + w]!;
      information[pt * count + thetaIndex[w]!]! += sum;
    }
    let [toC0, toS, toSc, toSu] = [0, 0, 0, 0];
    for (let j = 0; j < n; j++) {
      const x = design[j * thetaCount + t]!;
      toC0 += x * reduced[j * width + n]!;
      toS += x * reduced[j * width + n + 1]!;
      toSc += x * reduced[j * width + n + 2]!;
      toSu += x * reduced[j * width + n + 3]!;
    }
    information[at.c0 * count + pt]! += toC0;
    addPair(information, count, pt, at.lnS, toS);
    addPair(information, count, pt, at.lnSc, toSc);
    addPair(information, count, pt, at.lnSu, toSu);
  }
  const scalars = [at.c0, at.lnS, at.lnSc, at.lnSu];
  for (let i = 0; i < reducedExtras; i++) {
    for (let j = i; j < reducedExtras; j++) {
      information[scalars[i]! * count + scalars[j]!]! += reduced[(n + i) * width + n + j]!;
    }
  }
  subtractCurvature(work, first, n, scoreMean, information);
}

function addPair(information: Float64Array, count: number, i: number, j: number, value: number): void {
  information[Math.min(i, j) * count + Math.max(i, j)]! += value;
}

/** The part of d²ln(1-q)/dtheta² that is not a product of the design's rows: share x x', per mechanism. */
function subtractCurvature(
  work: Workspace,
  first: number,
  n: number,
  scoreMean: Float64Array,
  information: Float64Array,
): void {
  const { design, calendarShare, thetaCount, thetaIndex, parameterCount: count } = work;
  for (let j = 0; j < n; j++) {
    const calendar = calendarShare[first + j]!;
    const place = j * thetaCount;
    for (let block = 0; block < 2; block++) {
      const share = block === 0 ? calendar : 1 - calendar;
      if (share < 1e-200) continue;
      const from = block === 0 ? 0 : calendarCount;
      const to = block === 0 ? calendarCount : thetaCount;
      const scaled = scoreMean[j]! / share;
      for (let t = from; t < to; t++) {
        const left = scaled * design[place + t]!;
        const row = thetaIndex[t]! * count;
        for (let w = t; w < to; w++) information[row + thetaIndex[w]!]! -= left * design[place + w]!;
      }
    }
  }
}
