import type { Role } from '@/lib/contract/accounts';

export interface DemoAccount {
  email: string;
  password: string;
  role: Role;
  note: string;
}

const password = 'ebb-and-flow-2026';

/** The accounts of the demo scenario: seeded, and offered on the sign-in page in demo mode only. */
export const demoAccounts: readonly DemoAccount[] = [
  { email: 'owner@demo.example', password, role: 'owner', note: 'An owner with banks and yearly checks' },
  { email: 'moderator@demo.example', password, role: 'moderator', note: 'Screens what owners submit' },
  { email: 'steward@demo.example', password, role: 'steward', note: 'Runs the exchange' },
  { email: 'owner2@demo.example', password, role: 'owner', note: 'A second owner' },
  { email: 'owner3@demo.example', password, role: 'owner', note: 'A third owner' },
  { email: 'owner4@demo.example', password, role: 'owner', note: 'A fourth owner' },
  { email: 'owner5@demo.example', password, role: 'owner', note: 'A fifth owner' },
];
