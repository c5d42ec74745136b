import { at } from './parameters';
import type { Prior } from './priors';
import { accumulateBank, type CellTypeSums } from './accumulate';
import { bankScales, fillGross, integrateBank } from './bankNodes';
import { cellTypeNodes, centreNode, type Workspace } from './workspace';

/** Value, gradient and information of the penalised marginal log-likelihood at one psi. */
export interface Evaluation {
  psi: Float64Array;
  /** ln p(y | psi) + ln prior (up to the prior's constant). */
  objective: number;
  logLikelihood: number;
  gradient: Float64Array;
  /** Information + prior precision, parameters x parameters, full. */
  information: Float64Array;
  /** Per cell type: score, information and cross information (x parameters) of its effect at its mode. */
  cellTypeScore: Float64Array;
  cellTypeInformation: Float64Array;
  cellTypeCross: Float64Array;
  /** Per cell type: posterior mean of its effect given psi. */
  cellTypeMean: Float64Array;
}

/**
 * Evaluate the objective at psi by nested adaptive Gauss-Hermite quadrature, with gradient by Fisher's identity and
 * information by Louis (README equations 5 to 13). Moves the centres of the quadrature to psi.
 */
export function evaluate(work: Workspace, psi: Float64Array, priors: readonly Prior[]): Evaluation {
  const { table, parameterCount: count } = work;
  const result: Evaluation = {
    psi: psi.slice(),
    objective: 0,
    logLikelihood: 0,
    gradient: new Float64Array(count),
    information: new Float64Array(count * count),
    cellTypeScore: new Float64Array(table.cellTypes),
    cellTypeInformation: new Float64Array(table.cellTypes),
    cellTypeCross: new Float64Array(table.cellTypes * count),
    cellTypeMean: new Float64Array(table.cellTypes),
  };
  fillGross(work, psi);
  for (let cellType = 0; cellType < table.cellTypes; cellType++) addCellType(work, psi, cellType, result);
  mirror(result.information, count);
  result.objective = result.logLikelihood;
  priors.forEach((prior, i) => {
    const off = (psi[i]! - prior.mean) / prior.sd;
    result.objective -= 0.5 * off * off;
    result.gradient[i]! -= off / prior.sd;
    result.information[i * count + i]! += 1 / (prior.sd * prior.sd);
  });
  return result;
}

function addCellType(work: Workspace, psi: Float64Array, cellType: number, result: Evaluation): void {
  const { table, centres, cellTypeRule, parameterCount: count } = work;
  const scales = bankScales(psi);
  const sm2 = Math.exp(2 * psi[at.lnSm]!);
  const from = table.cellTypeStart[cellType]!;
  const to = table.cellTypeStart[cellType + 1]!;
  const rowBase = table.bankStart[from]!;
  const mode = centres.cellTypeModes[cellType]!;
  const scale = centres.cellTypeScales[cellType]!;

  const effects = new Float64Array(cellTypeNodes);
  const weights = new Float64Array(cellTypeNodes);
  for (let node = 0; node < cellTypeNodes; node++) {
    const m = mode + scale * cellTypeRule.nodes[node]!;
    effects[node] = m;
    let sum = cellTypeRule.logWeights[node]! - (0.5 * m * m) / sm2;
    for (let bank = from; bank < to; bank++) {
      integrateBank(work, scales, bank, bank - from, rowBase, node, m);
      sum += work.bankLogLikelihood[(bank - from) * cellTypeNodes + node]!;
    }
    weights[node] = sum;
  }
  const largest = Math.max(...weights);
  let total = 0;
  for (let node = 0; node < cellTypeNodes; node++) {
    weights[node] = Math.exp(weights[node]! - largest);
    total += weights[node]!;
  }
  for (let node = 0; node < cellTypeNodes; node++) weights[node]! /= total;
  result.logLikelihood +=
    largest + Math.log(total) + Math.log(scale) - psi[at.lnSm]! - 0.5 * Math.log(2 * Math.PI);

  const sums: CellTypeSums = {
    scores: new Float64Array(cellTypeNodes * count),
    scoreM: 0,
    informationM: 0,
    crossM: new Float64Array(count),
  };
  for (let bank = from; bank < to; bank++) {
    accumulateBank(work, scales, bank, bank - from, rowBase, weights, result.information, sums);
  }
  closeCellType(result, cellType, count, sm2, effects, weights, sums);
}

/** Louis at the level of cell types: add the variance of the summed scores over the nodes of m (equation 13). */
function closeCellType(
  result: Evaluation,
  cellType: number,
  count: number,
  sm2: number,
  effects: Float64Array,
  weights: Float64Array,
  sums: CellTypeSums,
): void {
  const { scores } = sums;
  const mean = new Float64Array(count);
  for (let node = 0; node < cellTypeNodes; node++) {
    const squared = (effects[node]! * effects[node]!) / sm2;
    scores[node * count + at.lnSm]! += squared - 1;
    result.information[at.lnSm * count + at.lnSm]! += weights[node]! * 2 * squared;
    result.cellTypeMean[cellType]! += weights[node]! * effects[node]!;
    for (let i = 0; i < count; i++) mean[i]! += weights[node]! * scores[node * count + i]!;
  }
  for (let i = 0; i < count; i++) {
    result.gradient[i]! += mean[i]!;
    for (let j = i; j < count; j++) {
      let variance = 0;
      for (let node = 0; node < cellTypeNodes; node++) {
        variance +=
          weights[node]! * (scores[node * count + i]! - mean[i]!) * (scores[node * count + j]! - mean[j]!);
      }
      result.information[i * count + j]! -= variance;
    }
  }
  const mode = effects[centreNode]!;
  result.cellTypeScore[cellType] = sums.scoreM - mode / sm2;
  result.cellTypeInformation[cellType] = sums.informationM + 1 / sm2;
  sums.crossM[at.lnSm]! -= (2 * mode) / sm2;
  result.cellTypeCross.set(sums.crossM, cellType * count);
}

function mirror(matrix: Float64Array, count: number): void {
  for (let i = 0; i < count; i++) {
    for (let j = i + 1; j < count; j++) matrix[j * count + i] = matrix[i * count + j]!;
  }
}
