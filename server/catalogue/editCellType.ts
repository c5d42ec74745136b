import { Op, type Transaction } from 'sequelize';

import type { CellTypeFields } from '@/lib/contract/catalogue';
import { formatCount } from '@/lib/units';

import { CellType } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { countDependents, findOpenEntry } from './queries';
import { requestRecompute } from './recomputeChecks';

interface Edit {
  version: number;
  isRecomputeAccepted: boolean;
  fields: CellTypeFields;
}

/** Fields that every check of the cell type is worked out with. */
const computedWith = ['ratedAh', 'nominalV'] as const;

/**
 * Puts the entry of a cell type right. A new rated capacity or voltage works out anew what depends on it, and says first
 * how much that is.
 * @throws AppError notFound, versionConflict, conflict (merged; or another one has maker and name), invalid (not
 * accepted that checks are worked out anew)
 */
export async function editCellType(
  deps: Deps,
  actor: SignedInActor,
  id: string,
  { version, isRecomputeAccepted, fields }: Edit,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const cellType = await findOpenEntry(id, version, transaction);
    const before: CellTypeFields = cellType;
    const keys = (Object.keys(fields) as (keyof CellTypeFields)[]).filter(
      (key) => before[key] !== fields[key],
    );
    if (keys.length === 0) return;
    await refuseSameName(id, fields, transaction);
    const moved = computedWith.filter((key) => keys.includes(key));
    const { banks, checks } = (await countDependents(deps.db, { cellTypeId: id, transaction }))(id);
    if (moved.length > 0 && checks > 0 && !isRecomputeAccepted)
      throw new AppError(
        'invalid',
        undefined,
        Object.fromEntries(moved.map((key) => [key, warning(banks, checks)])),
      );
    const changes = keys.map((key) => ({ field: key, before: before[key], after: fields[key] }));
    await cellType.update({ ...fields, version: version + 1 }, { transaction });
    const entry = { actor, at: deps.clock(), subjectType: 'cellType', subjectId: id } as const;
    await appendTrail({ ...entry, action: 'edited', details: { changes } }, transaction);
    if (moved.length > 0 && checks > 0) await requestRecompute(deps, id, transaction);
  });
}

function warning(banks: number, checks: number): string {
  const of = (count: number, one: string, many: string) =>
    `${formatCount(count)} ${count === 1 ? one : many}`;
  return `${of(checks, 'check', 'checks')} of ${of(banks, 'bank', 'banks')} would be worked out anew. Say that this is meant.`;
}

async function refuseSameName(
  id: string,
  { maker, name }: CellTypeFields,
  transaction: Transaction,
): Promise<void> {
  const same = await CellType.findOne({ where: { maker, name, id: { [Op.ne]: id } }, transaction });
  if (!same) return;
  const message = 'Another entry has this maker and name. Merge the two if they are one.';
  throw new AppError('conflict', message, { name: message });
}
