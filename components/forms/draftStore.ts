const prefix = 'ebbline.draft.';

/** What was kept under a key, read from JSON; undefined for nothing, and where storage is denied. */
export const readDraft = (key: string): unknown => {
  try {
    const text = window.localStorage.getItem(prefix + key);
    return text === null ? undefined : JSON.parse(text);
  } catch {
    return undefined;
  }
};

/** Forgets what was typed on this device and not sent, under `${user.id}/…` as useLocalDraft keeps it. */
export const forgetDraft = (key: string) => {
  try {
    window.localStorage.removeItem(prefix + key);
  } catch {
    // Nothing could be kept, so nothing is left.
  }
};

/** @returns whether it is kept: storage may be denied or full, and the form then works on without its copy. */
export const writeDraft = (key: string, values: string): boolean => {
  try {
    window.localStorage.setItem(prefix + key, values);
    return true;
  } catch {
    return false;
  }
};
