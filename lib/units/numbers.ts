/** Between a number and its unit, so that they never part and stand close. */
export const thinSpace = '\u202f';
export const enDash = '\u2013';
export const minusSign = '\u2212';
/** Stands where there is no number. */
export const noValue = '\u2013';

/** How many digits: `decimals` behind the point, or `significant` ones; without either, up to two decimals. */
export interface NumberFormatOptions {
  decimals?: number;
  significant?: number;
}

const formatters = new Map<string, Intl.NumberFormat>();

const formatterOf = ({ decimals, significant }: NumberFormatOptions): Intl.NumberFormat => {
  const key = `${decimals}/${significant}`;
  let formatter = formatters.get(key);
  if (!formatter) {
    formatter = new Intl.NumberFormat('en-GB', {
      ...(decimals !== undefined && { minimumFractionDigits: decimals, maximumFractionDigits: decimals }),
      ...(decimals === undefined &&
        significant !== undefined && {
          minimumSignificantDigits: significant,
          maximumSignificantDigits: significant,
        }),
      ...(decimals === undefined && significant === undefined && { maximumFractionDigits: 2 }),
    });
    formatters.set(key, formatter);
  }
  return formatter;
};

/** A number as English text: 1,204.5; a true minus sign; an en dash where the value is not finite. */
export function formatNumber(value: number, options: NumberFormatOptions = {}): string {
  if (!Number.isFinite(value)) return noValue;
  const text = formatterOf(options).format(value);
  return /[1-9]/.test(text) ? text.replace('-', minusSign) : text.replace('-', '');
}

/** A number with its unit: "226.4 Ah". The unit is any short text, so that "It" and "EFC" fit too. */
export function formatQuantity(value: number, unit: string, options: NumberFormatOptions = {}): string {
  const number = formatNumber(value, options);
  return number === noValue ? noValue : `${number}${thinSpace}${unit}`;
}

/** A share of one as a percentage: 0.923 is "92 %". */
export function formatPercent(fraction: number, decimals = 0): string {
  return formatQuantity(fraction * 100, '%', { decimals });
}

/** A whole count: "1,204"; "10 to 19" where only its range is known. */
export function formatCount(count: number | { from: number; to: number }): string {
  if (typeof count === 'object') return `${formatCount(count.from)} to ${formatCount(count.to)}`;
  return formatNumber(count, { decimals: 0 });
}

/** A range: "11.2–15.1", with its unit behind where one is given; "−2 to 3" where a bound is negative. */
export function formatRange(
  lower: number,
  upper: number,
  options: NumberFormatOptions & { unit?: string } = {},
): string {
  const joint = lower < 0 || upper < 0 ? ' to ' : enDash;
  const bounds = `${formatNumber(lower, options)}${joint}${formatNumber(upper, options)}`;
  return options.unit === undefined ? bounds : `${bounds}${thinSpace}${options.unit}`;
}

/** Years with one decimal unless told otherwise: "13.1 years". */
export function formatYears(years: number, decimals = 1): string {
  return formatQuantity(years, 'years', { decimals });
}

/**
 * A value with its ± in matching decimals, the ± rounded to two significant digits: "226.4 ± 2.5 Ah".
 * Source of the rounding: JCGM 100:2008, 7.2.6.
 */
export function formatUncertainty(value: number, plusMinus: number, unit: string): string {
  const decimals =
    plusMinus > 0 ? Math.min(6, Math.max(0, 1 - Number(plusMinus.toExponential(1).split('e')[1]))) : 1;
  const [number, margin] = [formatNumber(value, { decimals }), formatNumber(plusMinus, { decimals })];
  return `${number}${thinSpace}±${thinSpace}${margin}${thinSpace}${unit}`;
}

/** A duration in its two largest fitting units: "4 h 42 min", "3 min 20 s", "12 s". */
export function formatDuration(seconds: number): string {
  if (!Number.isFinite(seconds)) return noValue;
  const total = Math.max(0, Math.round(seconds));
  const pair = (large: number, largeUnit: string, small: number, smallUnit: string) =>
    [
      ...(large > 0 || small === 0 ? [formatQuantity(large, largeUnit, { decimals: 0 })] : []),
      ...(small > 0 ? [formatQuantity(small, smallUnit, { decimals: 0 })] : []),
    ].join(' ');
  if (total < 60) return formatQuantity(total, 's', { decimals: 0 });
  if (total < 600) return pair(Math.floor(total / 60), 'min', total % 60, 's');
  const minutes = Math.round(total / 60);
  if (minutes < 60) return formatQuantity(minutes, 'min', { decimals: 0 });
  return pair(Math.floor(minutes / 60), 'h', minutes % 60, 'min');
}
