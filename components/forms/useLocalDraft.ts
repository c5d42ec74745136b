import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';
import { forgetDraft, readDraft, writeDraft } from './draftStore';
import { mergeDraft } from './mergeDraft';

const waitMs = 400;

export interface LocalDraft {
  /** Something typed earlier was put back. */
  wasRestored: boolean;
  /** What is typed is kept on this device; for the page's note. */
  isSaved: boolean;
  /** Forgets the copy: after sending, and when the reader starts anew. */
  clear: () => void;
}

/**
 * Keeps what is typed into a form on this device and puts it back when the form is opened again.
 * @param key the account and the thing edited, such as `${user.id}/check/${bankId}`: drafts never cross accounts.
 *   Null while the account is not known: nothing is kept then.
 */
export function useLocalDraft<Form extends FieldValues, Read>(
  key: string | null,
  form: UseFormReturn<Form, unknown, Read>,
): LocalDraft {
  const { getValues, reset, subscribe, formState } = form;
  const kept = useMemo(() => (key === null ? undefined : readDraft(key)), [key]);
  // Of which key something was kept or forgotten since: of no other.
  const [savedKey, setSavedKey] = useState<string | null>(null);
  const [clearedKey, setClearedKey] = useState<string | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const untouched = useRef(JSON.stringify(formState.defaultValues));

  const save = useCallback(() => {
    timer.current = undefined;
    if (key === null) return;
    const values = JSON.stringify(getValues());
    if (values === untouched.current) forgetDraft(key);
    else setSavedKey(writeDraft(key, values) ? key : null);
  }, [key, getValues]);

  useEffect(() => {
    if (key === null) return;
    const stop = subscribe({
      formState: { values: true },
      callback: () => {
        clearTimeout(timer.current);
        timer.current = setTimeout(save, waitMs);
      },
    });
    if (kept !== undefined) reset(mergeDraft(getValues(), kept), { keepDefaultValues: true });
    // Leaving the page at once must not lose the last keystrokes.
    const saveNow = () => {
      if (timer.current === undefined) return;
      clearTimeout(timer.current);
      save();
    };
    window.addEventListener('pagehide', saveNow);
    return () => {
      stop();
      saveNow();
      window.removeEventListener('pagehide', saveNow);
    };
  }, [key, kept, getValues, reset, subscribe, save]);

  const clear = useCallback(() => {
    clearTimeout(timer.current);
    timer.current = undefined;
    setSavedKey(null);
    setClearedKey(key);
    if (key !== null) forgetDraft(key);
  }, [key]);

  const wasRestored = kept !== undefined && clearedKey !== key;
  return { wasRestored, isSaved: wasRestored || (key !== null && savedKey === key), clear };
}
