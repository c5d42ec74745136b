/** The drawing's edges in px, and the values that lie on them. */
export interface PlotArea {
  width: number;
  height: number;
  left: number;
  right: number;
  top: number;
  bottom: number;
  xDomain: readonly [number, number];
  yDomain: readonly [number, number];
}

const between = (value: number, [from, to]: readonly [number, number], start: number, end: number) =>
  start + ((value - from) / (to - from)) * (end - start);

/** px of a value across. */
export const xOf = (plot: PlotArea, value: number) =>
  between(value, plot.xDomain, plot.left, plot.width - plot.right);

/** px of a value down from the top. */
export const yOf = (plot: PlotArea, value: number) =>
  between(value, plot.yDomain, plot.height - plot.bottom, plot.top);

/** The step of 1, 2, 2.5 or 5 times a power of ten that gives about `count` ticks. */
export function niceStep(span: number, count: number): number {
  const rough = span / Math.max(1, count);
  const power = 10 ** Math.floor(Math.log10(rough));
  const share = rough / power;
  const factor = share <= 1 ? 1 : share <= 2 ? 2 : share <= 2.5 ? 2.5 : share <= 5 ? 5 : 10;
  return factor * power;
}

/** Round values within a domain. */
export function niceTicks([from, to]: readonly [number, number], count: number): number[] {
  const step = niceStep(to - from, count);
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  );
}

/** The least and greatest of some numbers that are finite; undefined for none. */
export function extentOf(values: Iterable<number>): [number, number] | undefined {
  let extent: [number, number] | undefined;
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    extent = extent ? [Math.min(extent[0], value), Math.max(extent[1], value)] : [value, value];
  }
  return extent;
}
