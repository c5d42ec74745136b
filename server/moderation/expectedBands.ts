import { predictNewCheck, type PublishedFit } from '@/lib/fit';
import type { Submission } from '@/lib/contract/moderation';

import type { Check } from '../db/models';
import type { FitInForce } from '../fits/currentFit';
import { pooledBank, pooledCheck } from '../pool/approvedRows';
import { poolRows } from '../pool/poolRow';
import type { LoadedSubmission } from './queries';

const standing = new Set(['submitted', 'sentBack', 'approved']);
const points = 12;
const firstYears = 0.1;
/** How far beyond the last check the bands go on, years. */
const beyond = 0.5;
const levels = { inner: 0.5, outer: 0.8 } as const;

/**
 * Where checks of banks used like this one lie over the years: 50 and 80 % of new measurements of new banks, under the
 * conditions this one lived under up to the check. Pure but for the fit that was read.
 */
export function expectedBands(
  working: FitInForce | null,
  check: LoadedSubmission,
  history: readonly Check[],
): Submission['expected'] {
  const { bank } = check;
  if (!working || bank.bought !== 'new') return [];
  const before = history.filter(
    ({ id, state, testedOn }) => id === check.id || (standing.has(state) && testedOn < check.testedOn),
  );
  const rows = poolRows(pooledBank(bank), before.map(pooledCheck));
  const row = rows.find(({ checkId }) => checkId === check.id)?.row;
  if (!row) return [];
  const model: PublishedFit = working.output.model;
  const use = {
    ...{ depthFraction: row.depthFraction, dischargeIt: row.dischargeIt, temperatureC: row.temperatureC },
    ...{ socMeanFraction: row.socMeanFraction, isClamped: row.isClamped },
    // A slip of the counter must not send the bands beyond what a bank can do.
    efcPerYear: Math.min(row.efc / row.ageYears, 2 * 365),
  };
  const isKnown = model.cellTypes.some(({ cellType }) => cellType === bank.cellTypeId);
  const options = isKnown ? { cellType: bank.cellTypeId } : {};
  const last = Math.max(...history.map(({ ageYears }) => ageYears), firstYears) + beyond;
  return Array.from({ length: points }, (_, i) => firstYears + ((last - firstYears) * i) / (points - 1)).map(
    (years) => {
      const at = (level: number): [number, number] => {
        const { lower, upper } = predictNewCheck(model, use, years, row.relSd, { ...options, level });
        return [lower, upper];
      };
      return { years, inner: at(levels.inner), outer: at(levels.outer) };
    },
  );
}
