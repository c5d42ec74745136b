import type { FadePoint } from './fadeSeries';

/** A curve of several in one drawing. */
export interface ComparedCurve {
  label: string;
  /** Over years. */
  curve: readonly FadePoint[];
}

/** The curve's last point that is drawn: where its label stands. */
export function labelPoint(curve: readonly FadePoint[], lowest: number): FadePoint | undefined {
  return curve.findLast(({ soh }) => soh >= lowest);
}

/** Shared axes of curves: years to the end of the longest, capacity down to 70 % or the least drawn. */
export function compareDomain(curves: readonly ComparedCurve[]): {
  x: readonly [number, number];
  y: readonly [number, number];
} {
  const points = curves.flatMap(({ curve }) => curve);
  const lowest = 0.7;
  const longest = Math.max(1, ...points.filter(({ soh }) => soh >= lowest).map(({ x }) => x));
  const highest = Math.max(1, ...points.map(({ soh }) => soh));
  return { x: [0, Math.ceil(longest)], y: [lowest, Math.ceil(highest * 20) / 20] };
}
