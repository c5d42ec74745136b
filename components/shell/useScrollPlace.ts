import { useEffect, useRef } from 'react';

const places = new Map<string, number>();
const settleMs = 1500;

/**
 * New pages begin at their top; going back returns to where one was, once the page is long enough again.
 * The browser's own restoring comes too early for pages that are drawn after their data arrived.
 */
export function useScrollPlace(pathname: string) {
  const cameBack = useRef(false);

  useEffect(() => {
    if (typeof window === 'undefined' || !window.history) return;
    window.history.scrollRestoration = 'manual';
    const noteBack = () => {
      cameBack.current = true;
    };
    window.addEventListener('popstate', noteBack);
    return () => window.removeEventListener('popstate', noteBack);
  }, []);

  useEffect(() => {
    if (typeof window === 'undefined' || !window.scrollTo) return;
    const goal = cameBack.current ? (places.get(pathname) ?? 0) : 0;
    cameBack.current = false;
    const until = performance.now() + settleMs;
    let frame = 0;
    const settle = () => {
      window.scrollTo(0, goal);
      if (Math.abs(window.scrollY - goal) > 1 && performance.now() < until)
        frame = requestAnimationFrame(settle);
    };
    settle();
    const note = () => places.set(pathname, window.scrollY);
    const timer = setTimeout(() => window.addEventListener('scroll', note, { passive: true }), 100);
    return () => {
      cancelAnimationFrame(frame);
      clearTimeout(timer);
      window.removeEventListener('scroll', note);
    };
  }, [pathname]);
}
