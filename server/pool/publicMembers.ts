import type { Transaction } from 'sequelize';

import { PublicMember } from '../db/models';
import type { PoolMember } from './poolRow';

/** The public pool: its checks with their rows as they entered, in a fixed order. */
export async function publicMembers(transaction: Transaction): Promise<PoolMember[]> {
  const members = await PublicMember.findAll({ order: [['checkId', 'ASC']], transaction });
  return members.map(({ checkId, row }) => ({ checkId, row }));
}
