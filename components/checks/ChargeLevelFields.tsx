import { useWatch } from 'react-hook-form';

import { BoundNumber, BoundRadio, BoundSource, FieldPair } from '@/components/forms';
import { Heading, Stack } from '@/components/ui';

import type { CheckControl } from './formTypes';

const ways = [
  { value: 'mean', label: 'As the mean of the day' },
  { value: 'window', label: 'As a window, from low to high' },
] as const;

/** How full the bank was on average. */
export function ChargeLevelFields({ control }: { control: CheckControl }) {
  const way = useWatch({ control, name: 'conditions.socAs' });
  return (
    <Stack gap="l">
      <Heading>State of charge</Heading>
      <BoundRadio control={control} name="conditions.socAs" label="I know it" options={ways} />
      {way === 'mean' ? (
        <BoundNumber
          control={control}
          name="conditions.socMeanFraction"
          label="Mean state of charge"
          hint="Over all hours, idle ones too. 50 % is half full."
          unit="%"
          footer={<BoundSource control={control} name="sources.socMeanFraction" of="the state of charge" />}
        />
      ) : (
        <FieldPair>
          <BoundNumber
            control={control}
            name="conditions.socLowFraction"
            label="Low end of the day"
            unit="%"
            footer={<BoundSource control={control} name="sources.socLowFraction" of="the low end" />}
          />
          <BoundNumber
            control={control}
            name="conditions.socHighFraction"
            label="High end of the day"
            unit="%"
            footer={<BoundSource control={control} name="sources.socHighFraction" of="the high end" />}
          />
        </FieldPair>
      )}
    </Stack>
  );
}
