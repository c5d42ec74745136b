import { useRef } from 'react';
import type { View } from 'react-native';
import type { WebKeyEvent } from '../keyEvent';

const steps: Record<string, 1 | -1> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 };

/**
 * One stop of the Tab key for a whole group, arrow keys within it, as radio groups do.
 * `index` is the chosen one, -1 for none; `choose` is called with the next one.
 */
export function useRovingFocus(count: number, index: number, choose: (index: number) => void) {
  const items = useRef<(View | null)[]>([]);

  const move = (from: number, by: number) => {
    const next = (from + by + count) % count;
    choose(next);
    items.current[next]?.focus();
  };

  return (position: number) => ({
    ref: (item: View | null) => {
      items.current[position] = item;
    },
    tabIndex: (position === Math.max(0, index) ? 0 : -1) as 0 | -1,
    onKeyDown: (event: WebKeyEvent) => {
      const step = steps[event.key];
      if (step) {
        event.preventDefault();
        move(position, step);
      } else if (event.key === ' ') {
        event.preventDefault();
        choose(position);
      }
    },
  });
}
