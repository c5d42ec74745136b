import { parseNumber } from './parseNumber';

const unitSeconds: Record<string, number> = { h: 3600, min: 60, m: 60, s: 1 };
const clock = /^(\d{1,4}):([0-5]?\d)(?::([0-5]?\d(?:[.,]\d+)?))?$/;
const words = /^(?:\d+(?:[.,]\d+)?\s*(?:h|min|m|s)\s*)+$/;
const trailing = /^(\d+)\s*h\s*([0-5]\d)$/;

/**
 * Reads a duration as people type it, in seconds: "4:42" and "4:42:10" (hours first), "4 h 42 min", "4h42", "4.7 h",
 * "282 min". A number alone is of no unit and is undefined, unless `plainUnit` says what it is in.
 */
export function parseDuration(
  text: string,
  { plainUnit }: { plainUnit?: 's' | 'min' | 'h' } = {},
): number | undefined {
  const tidy = text
    .trim()
    .toLowerCase()
    .replace(/[\u00a0\u2009\u202f]/g, ' ');
  if (tidy === '' || tidy.length > 40) return undefined;
  const onClock = clock.exec(tidy);
  if (onClock) {
    const [hours, minutes, seconds] = [onClock[1], onClock[2], onClock[3] ?? '0'];
    return Number(hours) * 3600 + Number(minutes) * 60 + (parseNumber(seconds) ?? 0);
  }
  const spoken = trailing.exec(tidy);
  if (spoken) return Number(spoken[1]) * 3600 + Number(spoken[2]) * 60;
  if (words.test(tidy)) {
    const parts = tidy.matchAll(/(\d+(?:[.,]\d+)?)\s*(h|min|m|s)/g);
    return [...parts].reduce(
      (sum, [, number = '', unit = '']) => sum + (parseNumber(number) ?? 0) * (unitSeconds[unit] ?? 0),
      0,
    );
  }
  const plain = plainUnit && parseNumber(tidy);
  return plain === undefined || plainUnit === undefined || plain < 0
    ? undefined
    : plain * (unitSeconds[plainUnit] ?? 1);
}

/** A duration as it is typed into a field: 16920 s is "4:42", 16930 s is "4:42:10". */
export function clockOfDuration(seconds: number): string {
  const total = Math.max(0, Math.round(seconds));
  const pair = (value: number) => String(value).padStart(2, '0');
  const stem = `${Math.floor(total / 3600)}:${pair(Math.floor((total % 3600) / 60))}`;
  return total % 60 === 0 ? stem : `${stem}:${pair(total % 60)}`;
}
