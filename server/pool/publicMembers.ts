import type { Transaction } from 'sequelize';

import { PublicMember } from '../db/models';
import { inCanonicalOrder } from '../publicView/canonicalOrder';
import { protections } from '../publicView/protections';
import { publicBanks } from './planStep';
import type { PoolMember, PublicPoolMember } from './poolRow';

/** The public pool: its checks with their rows as they entered and how far their banks are generalised. */
export async function publicMembers(transaction?: Transaction): Promise<PublicPoolMember[]> {
  const members = await PublicMember.findAll({ order: [['checkId', 'ASC']], transaction });
  return members.map(({ checkId, row, identity, level }) => ({ checkId, row, identity, level }));
}

/** The rows of the public pool as they are published, in the order of a release. */
export async function publishedMembers(transaction?: Transaction): Promise<PoolMember[]> {
  const banks = publicBanks(await publicMembers(transaction));
  return inCanonicalOrder(banks, protections).flatMap(({ checks }) => checks);
}
