import { minimumOwners } from '@/lib/contract/limits';
import type { Standing } from '@/lib/contract/standing';
import { bankPosterior, outsideOf, reachOfUse, standingOf } from '@/lib/fit';
import { calendarDateOf, yearsBetween } from '@/lib/units';

import type { LoadedBank } from '../banks/queries';
import type { Deps } from '../deps';
import { findCurrentFit } from '../fits/currentFit';
import { findWorkingPool } from '../moderation/workingPool';
import { findContribution } from './contribution';
import { findOwnRows } from './findOwnRows';
import { presentForecast } from './forecast';
import { growthBands } from './growthBands';
import { leversOf, ownUse } from './ownUse';

const nothing = { outside: [], use: null, basis: null, bands: [], pace: null, forecast: null, levers: [] };

/** A bank among banks used like it, by the working fit in force. For its owner only. */
export async function findStanding(deps: Deps, bank: LoadedBank): Promise<Standing> {
  const [working, pool] = await Promise.all([findCurrentFit(deps, 'working'), findWorkingPool(deps)]);
  const { rows, approved, notes } = await findOwnRows(bank, pool?.setAside ?? new Set());
  const base = {
    ...{ ...nothing, notes, checksUsed: rows.length },
    contribution: await findContribution(deps, bank, approved),
    fittedAt: working?.fittedAt.toISOString() ?? null,
  };
  const last = rows.at(-1);
  if (!last) return { ...base, state: 'noCheck' };
  if (!working || working.output.pool.evidence.owners < minimumOwners) return { ...base, state: 'noFit' };
  const { model } = working.output;
  const use = ownUse(last);
  const outside = outsideOf(model.reach, use);
  if (outside.length > 0) return { ...base, state: 'outside', use, outside };
  const row = model.cellTypes.find(({ cellType }) => cellType === bank.cellTypeId);
  const cellType = row?.cellType;
  const posterior = bankPosterior(model, rows, bank.cellTypeId);
  const { fasterFraction, paceRatio } = standingOf(posterior);
  const reach = reachOfUse(posterior.basis === 'cellType' && row ? row.reach : model.reach, use);
  const { firstUseMonth } = bank;
  const ageYears = yearsBetween(firstUseMonth, calendarDateOf(deps.clock()));
  return {
    ...{ ...base, state: 'ready', use, basis: posterior.basis },
    bands: growthBands(model, use, { cellType, reach, lastYears: last.ageYears }),
    pace: { fasterFraction, ratio: paceRatio },
    forecast: presentForecast(model, { posterior, use, reach, cellType, firstUseMonth, ageYears }),
    levers: leversOf(model, use),
  };
}
