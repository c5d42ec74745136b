import { demoAccounts } from '../accounts/demoAccounts';
import type { DemoData } from '@/data/demo/types';
import type { Role } from '@/lib/contract/accounts';

/** An account of the demo before its password is hashed. */
interface DemoUser {
  id: string;
  email: string;
  role: Role;
  createdAt: Date;
}

/** Ids of those who screen; fixed, as everything of the scenario is. */
const staffIds: Record<Exclude<Role, 'owner'>, string> = {
  moderator: '6f1d1c0e-7f0b-4c55-9a53-2b8e40d1a7c1',
  steward: '0b7a2f64-91a3-4a0d-8c1e-5d7f9e3c6b12',
};
const opened = new Date('2018-06-01T08:00:00Z');
const dayMs = 86_400_000;

/** The accounts: those offered on the sign-in page first, then owners nobody signs in as. */
export function demoUsers({ owners, banks }: DemoData): DemoUser[] {
  const joined = new Map<string, string>();
  for (const { ownerId, createdAt } of banks) {
    const known = joined.get(ownerId);
    if (known === undefined || createdAt < known) joined.set(ownerId, createdAt);
  }
  const named = demoAccounts.filter(({ role }) => role === 'owner');
  const ownerUsers = owners.map(({ id }, place): DemoUser => ({
    id,
    email: named[place]?.email ?? `owner${place + 1}@demo.example`,
    role: 'owner',
    createdAt: new Date(Date.parse(joined.get(id)!) - dayMs),
  }));
  const staff = demoAccounts.flatMap(({ email, role }): DemoUser[] =>
    role === 'owner' ? [] : [{ id: staffIds[role], email, role, createdAt: opened }],
  );
  return [...staff, ...ownerUsers];
}

/** Who decided on the demo's checks. */
export const demoModeratorId = staffIds.moderator;
