import type { Correctable, Correction } from '@/lib/contract/checks';
import { formatDuration, formatQuantity } from '@/lib/units';

const words: Record<keyof Correctable, [label: string, write: (value: number) => string]> = {
  capacityAh: ['Charge', (value) => formatQuantity(value, 'Ah', { decimals: 1 })],
  energyWh: ['Energy', (value) => formatQuantity(value / 1000, 'kWh', { decimals: 2 })],
  meanCurrentA: ['Mean current', (value) => formatQuantity(value, 'A', { decimals: 1 })],
  durationS: ['Duration', formatDuration],
  temperatureStartC: ['Temperature at the start', (value) => formatQuantity(value, '°C', { decimals: 1 })],
  temperatureEndC: ['Temperature at the end', (value) => formatQuantity(value, '°C', { decimals: 1 })],
};

/** Each corrected figure: as it was given and as it was corrected. */
export function correctionItems({ before, after }: Correction): { label: string; value: string }[] {
  return (Object.keys(after) as (keyof Correctable)[]).map((key) => {
    const [label, write] = words[key];
    return { label, value: `${write(before[key]!)} given, ${write(after[key]!)} corrected` };
  });
}
