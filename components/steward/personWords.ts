import type { Role } from '@/lib/contract/accounts';
import type { Person } from '@/lib/contract/steward';

import type { PersonAct } from '@/lib/client/steward';

export const roleWords: Record<Role, string> = { owner: 'Owner', moderator: 'Moderator', steward: 'Steward' };

/** What an account goes by where its address is not told. */
export const nameOf = ({ email, id }: Pick<Person, 'email' | 'id'>) => email ?? `Account ${id}`;

interface ActWords {
  label: string;
  title: (name: string) => string;
  text: string;
  done: string;
  failed: string;
  isDangerous: boolean;
}

export const actWords: Record<PersonAct, ActWords> = {
  dismiss: {
    label: 'Take the role away',
    title: (name) => `Take the role from ${name}?`,
    text: 'It holds at once, in every browser. The account stays, as an owner’s, and is told by mail.',
    done: 'The role is taken away.',
    failed: 'The role was not taken away',
    isDangerous: true,
  },
  lock: {
    label: 'Lock',
    title: (name) => `Lock ${name}?`,
    text: 'Every sign-in of the account ends at once, and none is possible until it is unlocked. Its checks go on counting. Its owner gets the reason by mail.',
    done: 'The account is locked.',
    failed: 'The account was not locked',
    isDangerous: true,
  },
  unlock: {
    label: 'Unlock',
    title: (name) => `Unlock ${name}?`,
    text: 'The account can sign in again, and is told by mail. The reason stands in the trail only.',
    done: 'The account is unlocked.',
    failed: 'The account was not unlocked',
    isDangerous: false,
  },
  'clear-second-factor': {
    label: 'Clear the second factor',
    title: (name) => `Clear the second factor of ${name}?`,
    text: 'For somebody who has lost both app and recovery codes. Be sure that it is they who ask: the password alone opens the account afterwards. Its sign-ins end, and its owner gets the reason by mail.',
    done: 'The second factor is cleared.',
    failed: 'The second factor was not cleared',
    isDangerous: true,
  },
};
