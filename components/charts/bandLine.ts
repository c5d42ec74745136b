import { extentOf, niceStep } from './chartScale';

/** A point of a curve with its range. */
export interface BandPoint {
  x: number;
  y: number;
  lower: number;
  upper: number;
  /** The reading in words: "15 kWh: €0.16 per kWh, 13 years". */
  reading: string;
}

/** A place on the curve that has a name. */
export interface BandMark {
  x: number;
  y: number;
  label: string;
}

/** Both axes from round value to round value past the curve, its range and its marks. */
export function bandDomain(
  points: readonly BandPoint[],
  marks: readonly BandMark[],
): { x: readonly [number, number]; y: readonly [number, number] } {
  const x = extentOf([...points, ...marks].map((point) => point.x)) ?? [0, 1];
  const y = extentOf([...points.flatMap(({ lower, upper }) => [lower, upper]), ...marks.map((one) => one.y)]);
  const [from, to] = y ?? [0, 1];
  const span = to > from ? to - from : Math.abs(to) || 1;
  const step = niceStep(span, 5);
  return { x, y: [Math.max(0, Math.floor(from / step) * step), Math.ceil(to / step + 1e-9) * step] };
}
