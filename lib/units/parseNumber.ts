// Ordinary, no-break, thin, narrow no-break and figure spaces, and apostrophes, stand between thousands.
const groupMarks = /[ \u00a0\u2009\u202f\u2007'’]/g;
const plain = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;

const isGrouped = (text: string, mark: string): boolean => {
  const groups = text.replace(/^[+-]/, '').split(mark);
  return groups.every((group, index) => (index === 0 ? /^\d{1,3}$/ : /^\d{3}$/).test(group));
};

/** Removes thousands marks from the whole part, or answers undefined where they do not stand every three digits. */
const ungroup = (whole: string, mark: string): string | undefined => {
  if (!whole.includes(mark)) return whole;
  return isGrouped(whole, mark) ? whole.split(mark).join('') : undefined;
};

const ungroupSpaces = (text: string): string | undefined => {
  const end = text.search(/[.,eE]/);
  const whole = end < 0 ? text : text.slice(0, end);
  const rest = end < 0 ? '' : text.slice(end);
  const joined = ungroup(whole, ' ');
  return joined === undefined ? undefined : joined + rest;
};

/** Turns commas and points into one decimal point at most, or answers undefined. */
const withDecimalPoint = (text: string): string | undefined => {
  const lastComma = text.lastIndexOf(',');
  const lastPoint = text.lastIndexOf('.');
  if (lastComma < 0 && lastPoint < 0) return text;
  if (lastComma >= 0 && lastPoint >= 0) {
    const decimalAt = Math.max(lastComma, lastPoint);
    const whole = ungroup(text.slice(0, decimalAt), lastComma > lastPoint ? '.' : ',');
    const fraction = text.slice(decimalAt + 1);
    return whole === undefined ? undefined : `${whole}.${fraction}`;
  }
  const mark = lastComma >= 0 ? ',' : '.';
  // One mark alone is the decimal mark: "1,234" is 1.234. Several can only be thousands.
  if (text.indexOf(mark) === text.lastIndexOf(mark)) return text.replace(mark, '.');
  return ungroup(text, mark);
};

/**
 * Reads a number as people type it: decimal point or decimal comma, thousands set off by spaces, apostrophes
 * or the other mark, unicode minus, powers of ten ("1e3").
 *
 * A single comma or point is always the decimal mark ("1,234" is 1.234), because owners type capacities with
 * decimals far more often than thousands; forms show what was understood. "1,234.5", "1.234,5" and "1,234,567"
 * can only be read one way and are. Anything else ("12abc", "1.2.3", "", "Infinity") is undefined.
 */
export function parseNumber(text: string): number | undefined {
  if (text.length > 60) return undefined;
  const signed = text.trim().replace(/^[\u2212\u2013]/, '-');
  const spaced = signed.replace(groupMarks, ' ');
  const joined = ungroupSpaces(spaced);
  if (joined === undefined || joined.includes(' ')) return undefined;
  const normal = withDecimalPoint(joined);
  if (normal === undefined || !plain.test(normal)) return undefined;
  const value = Number(normal);
  return Number.isFinite(value) ? value : undefined;
}
