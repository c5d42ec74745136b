import { useEffect, useRef } from 'react';

const isTyping = (target: EventTarget | null) =>
  target instanceof HTMLElement &&
  (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));

/** Calls what belongs to a single key (letters as capitals), unless the reader is typing, holds Ctrl, Alt or Meta, or a dialog is open. */
export function useHotkeys(keys: Readonly<Record<string, () => void>>, isOn = true) {
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });

  useEffect(() => {
    if (!isOn || typeof document === 'undefined') return;
    const listen = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.altKey || event.metaKey || event.repeat || isTyping(event.target)) return;
      if (document.querySelector('[aria-modal="true"]')) return;
      const act = latest.current[event.key.length === 1 ? event.key.toUpperCase() : event.key];
      if (!act) return;
      event.preventDefault();
      act();
    };
    document.addEventListener('keydown', listen);
    return () => document.removeEventListener('keydown', listen);
  }, [isOn]);
}
