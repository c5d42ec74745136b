import { formatNumber, parseNumber } from '@/lib/units';

interface Range {
  lowest: number;
  highest: number;
  unit: string;
}

/** What each message was made of: a form's errors carry their text alone. */
const ranges = new Map<string, Range>();

const shownText = (value: number) =>
  value !== 0 && Math.abs(value) < 1 ? formatNumber(value, { significant: 1 }) : formatNumber(value);

const sentence = ({ lowest, highest, unit }: Range) =>
  `Enter a number from ${shownText(lowest)} to ${shownText(highest)}${unit === '' ? '' : ` ${unit}`}.`;

/** The remark that a number lies outside its range, in the unit the form holds. */
export function rangeMessage(range: Range): string {
  const message = sentence(range);
  ranges.set(message, range);
  return message;
}

/**
 * The same remark in the unit that is shown; other messages stay as they are.
 * @param convertTyped takes text from one unit into another
 */
export function messageInUnit<U extends string>(
  message: string | undefined,
  shownUnit: U,
  convertTyped: (text: string, from: U, to: U) => string,
): string | undefined {
  const range = message === undefined ? undefined : ranges.get(message);
  if (!range || range.unit === shownUnit) return message;
  const inUnit = (value: number) => parseNumber(convertTyped(String(value), range.unit as U, shownUnit));
  const [lowest, highest] = [inUnit(range.lowest), inUnit(range.highest)];
  if (lowest === undefined || highest === undefined) return message;
  return sentence({ lowest, highest, unit: shownUnit });
}
