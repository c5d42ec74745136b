/** What is known of the time of one subject's event: it came after `left` and not after `right`. */
export interface IntervalObservation {
  left: number;
  /** Infinity: not seen yet (right-censored). */
  right: number;
  /** Under observation only because the event had not come by then (delayed entry); 0 when left out. */
  entry?: number;
}

/** Throws RangeError unless 0 <= entry <= left < right (left = right where an exact time is allowed). */
export function assertIntervals(
  observations: readonly IntervalObservation[],
  caller: string,
  isExactAllowed: boolean,
): void {
  for (const { left, right, entry = 0 } of observations) {
    const isOrdered = left < right || (isExactAllowed && left === right && left > 0);
    if (!(entry >= 0 && entry <= left && Number.isFinite(left) && isOrdered)) {
      throw new RangeError(`${caller} requires 0 <= entry <= left < right`);
    }
  }
}
