/** Limits per cell, V; null where one is not known. */
export interface CellLimits {
  chargeLimitV: number | null;
  dischargeLimitV: number | null;
}

/** A daily window of the state of charge, 0..1. */
export interface ChargeWindow {
  ok: true;
  lowFraction: number;
  highFraction: number;
  /** What the low end comes from: depth below the high end, or the discharge limit. */
  lowBy: 'depth' | 'limit';
}

export type ChargeWindowResult =
  | ChargeWindow
  /** The limit is missing, or lies where the voltage of LFP is flat and says nothing. */
  | { ok: false; reason: 'noChargeLimit' | 'chargeLimitFlat' | 'noDischargeLimit' | 'dischargeLimitFlat' };

/** How far such an estimate may be off, as a share of the capacity: common practice, no source. */
export const chargeWindowOffFraction = 0.05;

/**
 * State of charge at which a charge, or a discharge, at home rates of 0.05 to 0.3 It reaches a voltage under current:
 * common practice, no source. Between the two tables the voltage of LFP is flat, and tells nothing of the charge.
 */
const chargeEnds: readonly Point[] = [
  { cellV: 3.4, fraction: 0.9 },
  { cellV: 3.45, fraction: 0.95 },
  { cellV: 3.5, fraction: 0.98 },
  { cellV: 3.55, fraction: 0.99 },
  { cellV: 3.6, fraction: 1 },
];
const dischargeEnds: readonly Point[] = [
  { cellV: 2.5, fraction: 0 },
  { cellV: 2.8, fraction: 0.03 },
  { cellV: 3, fraction: 0.08 },
  { cellV: 3.1, fraction: 0.15 },
];

interface Point {
  cellV: number;
  fraction: number;
}

/**
 * The daily window of the state of charge from the limits set on charger and BMS. With a typical depth the low end is
 * that far below the high end, and not below the discharge limit; without one the bank is taken to be emptied to that
 * limit. Charge limits below 3.4 V and discharge limits above 3.1 V lie on the flat part of the curve: no estimate.
 * @param depthFraction charge taken out on a typical day / rated capacity, or null
 * @throws RangeError when the depth is not within 0 to 1.
 */
export function chargeWindowOfLimits(
  { chargeLimitV, dischargeLimitV }: CellLimits,
  depthFraction: number | null,
): ChargeWindowResult {
  if (depthFraction !== null && !(depthFraction > 0 && depthFraction <= 1))
    throw new RangeError('chargeWindowOfLimits requires a depth above 0, up to 1');
  if (chargeLimitV === null) return { ok: false, reason: 'noChargeLimit' };
  if (chargeLimitV < chargeEnds[0]!.cellV) return { ok: false, reason: 'chargeLimitFlat' };
  const highFraction = valueAt(chargeEnds, chargeLimitV);
  const isFlat = dischargeLimitV !== null && dischargeLimitV > dischargeEnds.at(-1)!.cellV;
  const floor = dischargeLimitV === null || isFlat ? null : valueAt(dischargeEnds, dischargeLimitV);
  if (depthFraction !== null) {
    const low = Math.max(floor ?? 0, highFraction - depthFraction);
    return { ok: true, highFraction, lowFraction: low, lowBy: low === floor ? 'limit' : 'depth' };
  }
  if (floor === null) return { ok: false, reason: isFlat ? 'dischargeLimitFlat' : 'noDischargeLimit' };
  return { ok: true, highFraction, lowFraction: floor, lowBy: 'limit' };
}

/** Between two points in proportion, at the nearest one outside. */
function valueAt(points: readonly Point[], cellV: number): number {
  const above = points.findIndex((point) => point.cellV >= cellV);
  if (above < 0) return points.at(-1)!.fraction;
  if (above === 0) return points[0]!.fraction;
  const [left, right] = [points[above - 1]!, points[above]!];
  const share = (cellV - left.cellV) / (right.cellV - left.cellV);
  return left.fraction + share * (right.fraction - left.fraction);
}
