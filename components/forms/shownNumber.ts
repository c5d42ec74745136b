import { convert, isConvertible, isUnit, parseNumber } from '@/lib/units';

const digits = 10;

const plain = (value: number) => String(Number(value.toPrecision(digits)));

/**
 * Typed text taken from one unit into another; text that is no number, and units that are none of ours, leave it as it
 * stands, so that nothing typed is lost.
 */
export function convertText(text: string, from: string, to: string): string {
  const value = parseNumber(text);
  if (value === undefined || from === to || !isUnit(from) || !isUnit(to) || !isConvertible(from, to))
    return text;
  return plain(convert(value, from, to));
}
