import { useSyncExternalStore } from 'react';

/** The single keys of the screening pages, in words. */
export const keyWords: readonly { key: string; does: string }[] = [
  { key: 'J', does: 'next check of the list' },
  { key: 'K', does: 'check before it' },
  { key: 'A', does: 'approve, or approve as likely meant' },
  { key: 'Q', does: 'ask the owner' },
  { key: 'T', does: 'turn away' },
  { key: 'U', does: 'undo, within half a minute' },
  { key: '?', does: 'this list' },
];

const storageKey = 'ebbline.screeningKeys';
const listeners = new Set<() => void>();
const hasStorage = () => typeof localStorage !== 'undefined';
const readIsOn = () => !hasStorage() || localStorage.getItem(storageKey) !== 'off';

function subscribe(listener: () => void) {
  listeners.add(listener);
  return () => void listeners.delete(listener);
}

/** Whether single keys decide: on unless they were switched off in this browser. */
export const useAreKeysOn = (): boolean => useSyncExternalStore(subscribe, readIsOn, () => true);

export function setAreKeysOn(isOn: boolean): void {
  if (!hasStorage()) return;
  localStorage.setItem(storageKey, isOn ? 'on' : 'off');
  for (const listener of listeners) listener();
}
