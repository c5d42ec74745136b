import { evaluate } from './evaluate';
import { parameterNames } from './parameters';
import type { ComponentFit } from './components';
import type { Prior } from './priors';
import type { PoolTable } from './table';
import { copyCentres, createWorkspace } from './workspace';

/** How far one parameter would move, in its standard errors, were a bank left out. */
export interface BankInfluence {
  bank: string;
  parameter: string;
  shiftInSe: number;
}

export const influenceCut = 0.3;

/**
 * Influence of each bank without refitting (README equation 25): delta psi = -V (s_i - I_psi,m / I_mm s_m,i), with
 * s_i the bank's score and the cell type's effect swept out. Pairs beyond the cut, largest first.
 */
export function bankInfluences(
  table: PoolTable,
  fit: ComponentFit,
  priors: readonly Prior[],
  cut = influenceCut,
): BankInfluence[] {
  const work = createWorkspace(table, fit.component.exponent, copyCentres(fit.centres));
  const count = work.parameterCount;
  work.bankScores = new Float64Array(table.banks * (count + 1));
  const at = evaluate(work, fit.evaluation.psi, priors);
  const { covariance } = fit.component;
  const found: BankInfluence[] = [];
  const swept = new Float64Array(count);
  for (let cellType = 0; cellType < table.cellTypes; cellType++) {
    const information = at.cellTypeInformation[cellType]!;
    for (let bank = table.cellTypeStart[cellType]!; bank < table.cellTypeStart[cellType + 1]!; bank++) {
      const place = bank * (count + 1);
      const ofM = work.bankScores[place + count]! / information;
      for (let i = 0; i < count; i++) {
        swept[i] = work.bankScores[place + i]! - at.cellTypeCross[cellType * count + i]! * ofM;
      }
      for (let i = 0; i < count; i++) {
        let shift = 0;
        for (let j = 0; j < count; j++) shift -= covariance[i * count + j]! * swept[j]!;
        const shiftInSe = shift / Math.sqrt(covariance[i * count + i]!);
        if (Math.abs(shiftInSe) > cut) {
          found.push({ bank: table.bankKeys[bank]!, parameter: parameterNames[i] ?? 'extra', shiftInSe });
        }
      }
    }
  }
  return found.sort((a, b) => Math.abs(b.shiftInSe) - Math.abs(a.shiftInSe));
}
