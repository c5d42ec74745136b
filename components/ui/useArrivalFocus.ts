import { useEffect, type RefObject } from 'react';
import type { Text } from 'react-native';

let isFirstPage = true;

/**
 * Moves the focus to the heading when a page is reached from another one, so that screen readers say where one is and
 * the Tab key starts there. The page opened first keeps the browser's own start.
 */
export function useArrivalFocus(heading: RefObject<Text | null>) {
  useEffect(() => {
    if (isFirstPage) {
      isFirstPage = false;
      return;
    }
    const node: unknown = heading.current;
    if (typeof HTMLElement !== 'undefined' && node instanceof HTMLElement)
      node.focus({ preventScroll: true });
  }, [heading]);
}
