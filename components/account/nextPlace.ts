import type { Href } from 'expo-router';

import type { Role } from '@/lib/contract/accounts';

/** Where one goes after signing in: back to the page of this product that asked for it, else to one's own work. */
export function nextPlace(next: string | undefined, role: Role): Href {
  if (next && /^\/(?![/\\])/.test(next)) return next as Href;
  return role === 'owner' ? '/banks' : '/screening';
}
