import { Segmented, Stack, Text } from '@/components/ui';
import { usualInverterFraction } from '@/lib/measure';
import { formatPercent } from '@/lib/units';

export type Metered = 'bank' | 'house';

const options = [
  { value: 'bank', label: 'at the bank' },
  { value: 'house', label: 'in the house' },
] as const;

/** Share of what the bank gives that a meter there sees. */
export const shareSeen: Record<Metered, number> = { bank: 1, house: usualInverterFraction };

/** What the share rests on, for an estimate's caveat. */
export const shareSeenWords = `In the house means behind an inverter that passes ${formatPercent(usualInverterFraction)} on: common practice, no source.`;

/** Whether a meter stands before or behind the inverter. */
export function MeteredWhere({ value, onChange }: { value: Metered; onChange: (value: Metered) => void }) {
  return (
    <Stack gap="xs">
      <Text weight="strong">Metered</Text>
      <Segmented label="Where it is metered" value={value} onChange={onChange} options={options} />
    </Stack>
  );
}
