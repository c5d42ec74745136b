import type { PlotArea } from './chartScale';

/** A part of a log's time, in seconds from its first stamp. */
export interface TimeWindow {
  startS: number;
  endS: number;
}

export type WindowEdge = keyof TimeWindow;

type Domain = readonly [number, number];

const clamp = (value: number, from: number, to: number) => Math.min(to, Math.max(from, value));

/** Seconds at a place across a drawing. */
export const secondsAt = (plot: PlotArea, x: number): number => {
  const [from, to] = plot.xDomain;
  return from + ((x - plot.left) / (plot.width - plot.left - plot.right)) * (to - from);
};

/** Shorter parts hold nothing that could be counted. */
const shortestS = 60;

/** A window with one of its edges moved: within the log, whole seconds, and never past the other edge. */
export function withEdge(
  window: TimeWindow,
  edge: WindowEdge,
  seconds: number,
  [first, last]: Domain,
): TimeWindow {
  const shortest = Math.min(shortestS, (last - first) / 2);
  const bounds: Domain =
    edge === 'startS' ? [first, window.endS - shortest] : [window.startS + shortest, last];
  return { ...window, [edge]: Math.round(clamp(seconds, ...bounds)) };
}

/** Where a key moves an edge to: arrows by a minute (of short logs by less), pages by ten; undefined for other keys. */
export function stepBy(key: string, seconds: number, [first, last]: Domain): number | undefined {
  const step = clamp(Math.round((last - first) / 200), 1, 60);
  const steps: Record<string, number> = {
    ArrowRight: seconds + step,
    ArrowUp: seconds + step,
    ArrowLeft: seconds - step,
    ArrowDown: seconds - step,
    PageUp: seconds + 10 * step,
    PageDown: seconds - 10 * step,
    Home: first,
    End: last,
  };
  return steps[key];
}
