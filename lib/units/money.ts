const currencyFormatter = (currency: string): Intl.NumberFormat =>
  new Intl.NumberFormat('en-GB', { style: 'currency', currency });

/** How many decimals a currency has: 2 for EUR, 0 for JPY. @throws RangeError when it is no ISO 4217 code. */
export function currencyDecimals(currency: string): number {
  return currencyFormatter(currency).resolvedOptions().maximumFractionDigits ?? 2;
}

/** Money from integer minor units: (123456, 'EUR') is "€1,234.56". @throws RangeError on a malformed currency code. */
export function formatMoney(minor: number, currency: string): string {
  return currencyFormatter(currency)
    .format(minor / 10 ** currencyDecimals(currency))
    .replace('-', '\u2212');
}

/** An amount in whole units as the integer minor units that are stored: (12.5, 'EUR') is 1250. */
export function minorUnitsOf(amount: number, currency: string): number {
  // toFixed first: 1.005 * 100 would round to the wrong cent.
  const decimals = currencyDecimals(currency);
  return Math.round(Number(`${amount.toFixed(decimals + 4)}e${decimals}`));
}

/** A small amount in whole units to two digits, as for one kWh: (0.0213, 'EUR') is "€0.021". @throws RangeError as formatMoney */
export function formatSmallMoney(amount: number, currency: string): string {
  const digits = { minimumSignificantDigits: 2, maximumSignificantDigits: 2 };
  return new Intl.NumberFormat('en-GB', { style: 'currency', currency, ...digits }).format(amount);
}
