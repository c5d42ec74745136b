import { Op } from 'sequelize';

import type { Person } from '@/lib/contract/steward';

import { SecondFactor, User } from '../db/models';

const mostListed = 500;
const there = { erasedAt: null };

/** Moderators and stewards, and the locked accounts of others. */
export async function findPeople(): Promise<{ staff: Person[]; locked: Person[] }> {
  const staff = await User.findAll({
    where: { ...there, role: ['moderator', 'steward'] },
    order: [
      ['role', 'DESC'],
      ['email', 'ASC'],
    ],
    limit: mostListed,
  });
  const locked = await User.findAll({
    where: { ...there, role: 'owner', lockedAt: { [Op.ne]: null } },
    order: [['lockedAt', 'DESC']],
    limit: mostListed,
  });
  return { staff: await present(staff), locked: await present(locked) };
}

/**
 * An account by its address or, as the trail has it, by its number. Found by number an owner keeps their address to
 * themselves: a steward who looks at what was done with a check need not learn whose it is.
 */
export async function findPerson(who: string): Promise<Person | null> {
  const byAddress = who.includes('@');
  const user = await User.findOne({
    where: { ...there, ...(byAddress ? { email: who.toLowerCase() } : { id: who }) },
  });
  if (!user) return null;
  const person = (await present([user]))[0]!;
  return { ...person, email: byAddress || user.role !== 'owner' ? person.email : null };
}

async function present(users: readonly User[]): Promise<Person[]> {
  const factors = await SecondFactor.findAll({
    where: { userId: users.map(({ id }) => id), confirmedAt: { [Op.ne]: null } },
    attributes: ['userId'],
  });
  const secured = new Set(factors.map(({ userId }) => userId));
  return users.map(({ id, email, role, emailVerifiedAt, lockedAt, createdAt }) => ({
    ...{ id, email, role, isConfirmed: emailVerifiedAt !== null },
    lockedAt: lockedAt?.toISOString() ?? null,
    hasSecondFactor: secured.has(id),
    since: createdAt.toISOString(),
  }));
}
