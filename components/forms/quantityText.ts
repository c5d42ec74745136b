import { z } from 'zod';

import { parseDuration } from '@/lib/units';

import { rangeMessage } from './rangeMessage';
import { numberText, optionalNumberText } from './textSchemas';

interface Limit {
  min: number;
  max: number;
}

const digits = 12;
const tidy = (value: number) => Number(value.toPrecision(digits));

const quantity = ({ min, max }: Limit, unit: string, shownPerStored: number) => {
  const [lowest, highest] = [tidy(min * shownPerStored), tidy(max * shownPerStored)];
  const message = rangeMessage({ lowest, highest, unit });
  return z
    .number()
    .min(lowest, message)
    .max(highest, message)
    .transform((shown) => tidy(shown / shownPerStored));
};

/**
 * Typed text as a quantity within a limit of the contract, whose message names the range in the unit typed.
 * @param unit as it stands in the field
 * @param shownPerStored how many of the field's units make one of the stored ones: 100 for a share typed in per cent
 */
export function quantityText(limit: Limit, unit: string, shownPerStored = 1) {
  return numberText(quantity(limit, unit, shownPerStored));
}

/** As quantityText; left empty it reads as null. */
export function optionalQuantityText(limit: Limit, unit: string, shownPerStored = 1) {
  return optionalNumberText(quantity(limit, unit, shownPerStored));
}

/** A duration as typed ("4:42", "4 h 42 min"), in seconds, within a limit of the contract. */
export function durationText({ min, max }: Limit) {
  return z.string().transform((text, context) => {
    const seconds = parseDuration(text);
    const message =
      text.trim() === ''
        ? 'This is needed.'
        : seconds === undefined
          ? 'Enter hours and minutes, such as 4:42 or 4 h 42 min.'
          : seconds < min || seconds > max
            ? `Enter a duration from ${min / 60} min to ${max / 3600} h.`
            : undefined;
    if (seconds !== undefined && message === undefined) return seconds;
    context.addIssue({ code: 'custom', message: message ?? '' });
    return z.NEVER;
  });
}
