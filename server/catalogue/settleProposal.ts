import type { Transaction } from 'sequelize';

import { type CellType, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueNotice } from '../mail/queueNotice';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { declinedNotice, listedNotice, type ProposalNotice } from './notices';
import { countDependents, findOpenEntry, statusOf } from './queries';

/**
 * Lists a proposed cell type, or one declined before: owners can choose it, and its page is public. Its proposer is told.
 * @throws AppError notFound, versionConflict, conflict (listed already, or merged)
 */
export async function listCellType(
  deps: Deps,
  actor: SignedInActor,
  id: string,
  version: number,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const cellType = await findOpenEntry(id, version, transaction);
    if (statusOf(cellType) === 'listed') throw new AppError('conflict', 'This cell type is listed already.');
    await cellType.update(
      { status: 'listed', closedAs: null, closedAt: null, proposedName: null, version: version + 1 },
      { transaction },
    );
    const entry = { actor, at: deps.clock(), subjectType: 'cellType', subjectId: id } as const;
    await appendTrail({ ...entry, action: 'listed', details: {} }, transaction);
    await tellProposer(deps, cellType, listedNotice(deps, cellType), transaction);
  });
}

/**
 * Declines a proposal; the reason goes to its proposer.
 * @throws AppError notFound, versionConflict, conflict (not a proposal, or approved checks rest on it)
 */
export async function declineCellType(
  deps: Deps,
  actor: SignedInActor,
  id: string,
  { version, reason }: { version: number; reason: string },
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const cellType = await findOpenEntry(id, version, transaction);
    if (statusOf(cellType) !== 'proposed') throw new AppError('conflict', 'This cell type is no proposal.');
    const { approvedChecks } = (await countDependents(deps.db, { cellTypeId: id, transaction }))(id);
    if (approvedChecks > 0)
      throw new AppError(
        'conflict',
        'Approved checks rest on it. Merge it into the cell type that it is, or list it.',
      );
    const at = deps.clock();
    await cellType.update({ closedAs: 'declined', closedAt: at, version: version + 1 }, { transaction });
    const entry = { actor, at, subjectType: 'cellType', subjectId: id } as const;
    await appendTrail({ ...entry, action: 'declined', details: { reason } }, transaction);
    await tellProposer(deps, cellType, declinedNotice(deps, cellType, reason), transaction);
  });
}

/** Once for each version of the entry; a proposer who has gone is told nothing. */
export async function tellProposer(
  deps: Deps,
  { id, version, proposedById }: CellType,
  notice: ProposalNotice,
  transaction: Transaction,
): Promise<void> {
  const proposer = proposedById && (await User.findByPk(proposedById, { transaction }));
  if (!proposer) return;
  const onceKey = `cellType:${id}:${version}`;
  await queueNotice(deps, proposer, { kind: 'decisions', ...notice, onceKey }, transaction);
}
