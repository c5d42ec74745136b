import { derive } from './derived';
import { fadePoint } from './fade';
import { z90 } from './normal';
import { at } from './parameters';
import type { PublishedFit, Ranged } from './types';
import type { Use } from './use';

/** Fade at the reference, and the part of it that cycles made. */
export interface FadeAtReference {
  years: number;
  use: Use;
  /** q, share of the start capacity. */
  totalFade: Ranged & { seLn: number; priorShare: number };
  /** Share of q from cycling, 0..1: hard to tell apart from the calendar, hence its wide range. */
  cyclingShare: Ranged & { seLogit: number; priorShare: number };
}

/** Where the model is centred: depth 0.5, 0.2 It, 25 °C, half full, unclamped, 500 full cycles in 4 years. */
const reference = {
  years: 4,
  use: {
    ...{ depthFraction: 0.5, dischargeIt: 0.2, temperatureC: 25, socMeanFraction: 0.5 },
    ...{ efcPerYear: 125, isClamped: false },
  },
};

/** The two figures a fit of both mechanisms comes down to: how much fade, and how it is split. */
export function fadeAtReference(fit: PublishedFit): FadeAtReference {
  const { years, use } = reference;
  const average = { kind: 'average' } as const;
  const total = derive(fit, average, ({ psi, exponent }) => {
    const { lnFade, slope } = fadePoint({ psi, exponent }, use, years);
    return { value: lnFade, gradient: slope };
  });
  const split = derive(fit, average, ({ psi, exponent }) => {
    const { calendarShare, slope } = fadePoint({ psi, exponent }, use, years);
    // logit of the share is ln GB - ln GA: undo the weights that the slopes of ln q carry.
    const gradient = slope.map((value, i) =>
      i < at.lnB ? -value / calendarShare : value / (1 - calendarShare),
    );
    return { value: Math.log((1 - calendarShare) / calendarShare), gradient };
  });
  const logistic = (x: number) => 1 / (1 + Math.exp(-x));
  const ends = ({ mean, se }: { mean: number; se: number }, scale: (x: number) => number): Ranged => ({
    estimate: scale(mean),
    lower: scale(mean - z90 * se),
    upper: scale(mean + z90 * se),
  });
  return {
    ...{ years, use },
    totalFade: { ...ends(total, Math.exp), seLn: total.se, priorShare: total.priorShare },
    cyclingShare: { ...ends(split, logistic), seLogit: split.se, priorShare: split.priorShare },
  };
}
