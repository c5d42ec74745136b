import { useSyncExternalStore } from 'react';

/** Colours by meaning; the values of both themes stand in theme.css. */
export const color = {
  paper: 'var(--paper)',
  surface: 'var(--surface)',
  wash: 'var(--wash)',
  ink: 'var(--ink)',
  quiet: 'var(--quiet)',
  line: 'var(--line)',
  tide: 'var(--tide)',
  tideSoft: 'var(--tide-soft)',
  tideWash: 'var(--tide-wash)',
  onTide: 'var(--on-tide)',
  brass: 'var(--brass)',
  brassWash: 'var(--brass-wash)',
  moss: 'var(--moss)',
  mossWash: 'var(--moss-wash)',
  rust: 'var(--rust)',
  rustWash: 'var(--rust-wash)',
  onRust: 'var(--on-rust)',
  shade: 'var(--shade)',
} as const;

export type Color = keyof typeof color;

export const font = {
  words: "'Schibsted Grotesk', 'Words Fallback', sans-serif",
  figures: "'Spline Sans Mono', ui-monospace, monospace",
} as const;

/** Type sizes in px. */
export const size = { small: 13, body: 15, lead: 17, heading: 21, title: 27, readout: 35 } as const;
export type Size = keyof typeof size;

export const lineHeight = (px: number) => Math.round(px * (px > 25 ? 1.18 : 1.45));

/** Distances in px. */
export const space = { hair: 2, xs: 4, s: 8, m: 12, l: 16, xl: 24, xxl: 40 } as const;
export type Space = keyof typeof space;

export const radius = { small: 4, control: 8 } as const;

/** Least height of a primary target, px (WCAG 2.2 asks 24; thumbs want 44). */
export const target = 44;

export const breakpoint = { stack: 600, rail: 900, content: 1200 } as const;

const canMatch = () => typeof window !== 'undefined' && typeof window.matchMedia === 'function';

const watch = (query: string) => (notify: () => void) => {
  if (!canMatch()) return () => {};
  const list = window.matchMedia(query);
  list.addEventListener('change', notify);
  return () => list.removeEventListener('change', notify);
};

const mediaStore = (query: string) => {
  const subscribe = watch(query);
  const read = () => canMatch() && window.matchMedia(query).matches;
  return () => useSyncExternalStore(subscribe, read, () => false);
};

const useIsFromStack = mediaStore(`(min-width: ${breakpoint.stack}px)`);
const useIsFromRail = mediaStore(`(min-width: ${breakpoint.rail}px)`);
const usePrefersDark = mediaStore('(prefers-color-scheme: dark)');

/** Whether the page is a phone's one column (below 600 px) or wide enough for the side rail (from 900 px). */
export function useLayout(): { isPhone: boolean; isWide: boolean } {
  const isFromStack = useIsFromStack();
  const isWide = useIsFromRail();
  return { isPhone: !isFromStack, isWide };
}

export type ThemeChoice = 'system' | 'light' | 'dark';

const themeKey = 'ebbline.theme';
const listeners = new Set<() => void>();

const readChoice = (): ThemeChoice => {
  if (typeof document === 'undefined') return 'system';
  const stored = document.documentElement.dataset.theme;
  return stored === 'light' || stored === 'dark' ? stored : 'system';
};

const subscribeToChoice = (notify: () => void) => {
  listeners.add(notify);
  return () => listeners.delete(notify);
};

/** Applies a choice at once and keeps it in this browser; public/theme.js reads it back before the first paint. */
const setThemeChoice = (choice: ThemeChoice) => {
  const root = document.documentElement;
  if (choice === 'system') delete root.dataset.theme;
  else root.dataset.theme = choice;
  try {
    if (choice === 'system') window.localStorage.removeItem(themeKey);
    else window.localStorage.setItem(themeKey, choice);
  } catch {
    // Storage may be denied: the choice then lasts until the page is closed.
  }
  listeners.forEach((notify) => notify());
};

/** The reader's choice of theme and the scheme it comes to. Colours follow by themselves, without a render. */
export function useTheme() {
  const choice = useSyncExternalStore(subscribeToChoice, readChoice, () => 'system' as const);
  const prefersDark = usePrefersDark();
  const scheme: 'light' | 'dark' = choice === 'system' ? (prefersDark ? 'dark' : 'light') : choice;
  return { choice, scheme, setChoice: setThemeChoice };
}
