import type { Href } from 'expo-router';

import type { Role } from '@/lib/contract/accounts';

/** Stands for this product's own address, which a link must not leave. */
const here = 'https://here.invalid';

/** Where one goes after signing in: back to the page of this product that asked for it, else to one's own work. */
export function nextPlace(next: string | undefined, role: Role): Href {
  if (next && isOwnPath(next)) return next as Href;
  return role === 'owner' ? '/banks' : '/screening';
}

const isOwnPath = (next: string) =>
  next.startsWith('/') && URL.canParse(next, here) && new URL(next, here).origin === here;
