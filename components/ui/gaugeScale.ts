/** The scale that all gauges of a list share. */
export interface GaugeScale {
  min: number;
  max: number;
  /** Ratios are drawn by their logarithm, so that twice and half lie equally far from 1. */
  isLog?: boolean;
}

/** Where a value lies on the scale, 0..1; values beyond it are held at its ends. */
export function positionOn({ min, max, isLog = false }: GaugeScale, value: number): number {
  const along = isLog ? Math.log(value / min) / Math.log(max / min) : (value - min) / (max - min);
  return Math.min(1, Math.max(0, along));
}

/** Whether a value lies beyond the scale's end, so that a drawing has to say so. */
export function isBeyond({ max }: GaugeScale, value: number): boolean {
  return value > max;
}
