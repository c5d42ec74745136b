import { randomInt } from 'node:crypto';

import type { Transaction } from 'sequelize';

import type { CellTypeProposal } from '@/lib/contract/proposals';

import { CellType } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findChoosableCellTypes } from './queries';

/** A person has a few kinds of cells; a script has many. */
const mostOpenProposals = 20;

/**
 * Stores a cell type that is not listed yet. Its proposer may use it at once; nobody else sees it but moderators, who
 * list it or merge it. What others have proposed changes nothing that the proposer can see.
 * @returns its id
 * @throws AppError invalid for one that is listed, or that the actor has proposed before; conflict for too many
 */
export async function proposeCellType(
  deps: Deps,
  actor: SignedInActor,
  proposal: CellTypeProposal,
): Promise<string> {
  return deps.db.transaction(async (transaction) => {
    const fields = { ...proposal, maker: tidy(proposal.maker), name: tidy(proposal.name) };
    await refuseKnown(actor, fields, transaction);
    const cellType = await CellType.create(
      {
        ...fields,
        ...(await namesApart(fields, transaction)),
        id: drawId(fields),
        status: 'proposed',
        proposedById: actor.userId,
      },
      { transaction },
    );
    const entry = { actor, at: deps.clock(), subjectType: 'cellType', subjectId: cellType.id } as const;
    await appendTrail({ ...entry, action: 'proposed', details: { fields } }, transaction);
    return cellType.id;
  });
}

type Named = Pick<CellTypeProposal, 'maker' | 'name'>;

const tidy = (text: string) => text.normalize('NFC').replace(/\s+/g, ' ').trim();

/** Alike for texts that differ by case, spaces and marks alone. */
const keyOf = ({ maker, name }: Named) =>
  `${maker} ${name}`
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{Letter}\p{Number}]/gu, '');

async function refuseKnown(
  { userId }: SignedInActor,
  fields: Named,
  transaction: Transaction,
): Promise<void> {
  const choosable = await findChoosableCellTypes(userId, transaction);
  const same = choosable.find(({ maker, name, proposedName }) => {
    return keyOf({ maker, name: proposedName ?? name }) === keyOf(fields);
  });
  if (same) {
    const message =
      same.status === 'listed'
        ? 'This cell type is listed already. Choose it from the list.'
        : 'You have proposed this cell type before. Choose it from the list.';
    throw new AppError('invalid', undefined, { name: message });
  }
  if (choosable.filter(({ status }) => status === 'proposed').length >= mostOpenProposals) {
    const message = `${mostOpenProposals} of your proposals wait to be listed. Propose more once some of them are.`;
    throw new AppError('conflict', message);
  }
}

/** The name the row goes by, and beside it what was typed where another's proposal has that name. */
async function namesApart({ maker, name }: Named, transaction: Transaction) {
  const isFree = async (tried: string) =>
    (await CellType.count({ where: { maker, name: tried }, transaction })) === 0;
  if (await isFree(name)) return { name };
  let number = 2;
  while (!(await isFree(`${name} (proposal ${number})`))) number += 1;
  return { name: `${name} (proposal ${number})`, proposedName: name };
}

const alphabet = 'cdfghjkmnpqrtvwxy34679';
const drawnLength = 5;

/** Readable, and drawn in part: whether another has proposed the same can't be told from it. */
function drawId({ name }: Named): string {
  const words = name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-+$/, '');
  const drawn = Array.from({ length: drawnLength }, () => alphabet[randomInt(alphabet.length)]).join('');
  return words === '' ? `cell-${drawn}` : `${words}-${drawn}`;
}
