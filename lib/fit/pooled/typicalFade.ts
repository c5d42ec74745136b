import { fadePoint } from './fade';
import { basisOf, type LifeOptions } from './life';
import { at } from './parameters';
import type { PublishedFit } from './types';
import type { Use } from './use';

/** The fade of a typical bank without its range: cheap enough to follow a use that changes as the bank fades. */
export interface TypicalFade {
  /** Capacity of a new bank, share of the rating (e^c0). */
  start: number;
  /** Fade q after some years, share of the start capacity, and the part of it that the calendar takes, 0..1. */
  at(use: Use, years: number): { fade: number; calendarShare: number };
}

/**
 * The typical fade of a published fit, averaged over its exponents on the scale of ln q (README equations 2 to 4, 17).
 * @throws RangeError on a cell type the fit does not know
 */
export function typicalFade(
  fit: PublishedFit,
  { cellType }: Pick<LifeOptions, 'cellType'> = {},
): TypicalFade {
  const basis = basisOf(fit, cellType);
  const parts = fit.components.map((component) => ({
    weight: component.weight,
    inputs: {
      psi: component.psi,
      exponent: component.exponent,
      shift: basis.kind === 'cellType' ? component.cellTypes[basis.index]!.m : 0,
    },
  }));
  const lnStart = parts.reduce((sum, { weight, inputs }) => sum + weight * inputs.psi[at.c0]!, 0);
  return {
    start: Math.exp(lnStart),
    at(use, years) {
      let lnFade = 0;
      let calendarShare = 0;
      for (const { weight, inputs } of parts) {
        const point = fadePoint(inputs, use, years);
        lnFade += weight * point.lnFade;
        calendarShare += weight * point.calendarShare;
      }
      return { fade: Math.exp(lnFade), calendarShare };
    },
  };
}
