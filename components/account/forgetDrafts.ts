/** Forgets what was typed on this device under an account, and not sent. */
export function forgetDrafts(userId: string): void {
  try {
    const drafts = Object.keys(window.localStorage).filter((key) =>
      key.startsWith(`ebbline.draft.${userId}/`),
    );
    for (const key of drafts) window.localStorage.removeItem(key);
  } catch {
    // Storage is denied, so nothing was kept in it.
  }
}
