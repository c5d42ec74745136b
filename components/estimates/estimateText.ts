import { parseNumber } from '@/lib/units';

/** A typed number above 0, or undefined. */
export function positive(text: string): number | undefined {
  const value = parseNumber(text);
  return value !== undefined && value > 0 ? value : undefined;
}

/** An estimate as the form holds it: no more digits than it deserves. */
export const roughText = (value: number, digits: number) => String(Number(value.toPrecision(digits)));
