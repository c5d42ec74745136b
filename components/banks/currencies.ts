import type { Option } from '@/components/ui';

let known: Option[] | undefined;

/** The currencies the browser knows, by their three letters with their names. */
export function currencyOptions(): Option[] {
  if (known) return known;
  const names = new Intl.DisplayNames('en-GB', { type: 'currency' });
  known = Intl.supportedValuesOf('currency').map((code) => ({
    value: code,
    label: `${code}, ${names.of(code)}`,
  }));
  return known;
}
