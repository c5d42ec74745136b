import { forgetAll } from '@/lib/client/deviceStore';

/** Forgets what an account has on this device: what was typed and not sent, files that wait, answers that were kept. */
export function forgetDrafts(userId: string): void {
  try {
    const drafts = Object.keys(window.localStorage).filter((key) =>
      key.startsWith(`ebbline.draft.${userId}/`),
    );
    for (const key of drafts) window.localStorage.removeItem(key);
  } catch {
    // Storage is denied, so nothing was kept in it.
  }
  for (const store of ['answers', 'waiting', 'files'] as const) void forgetAll(store, `${userId}/`);
}
