import { useWatch } from 'react-hook-form';

import { ChargeWindowEstimate } from '@/components/estimates';
import { BoundNumber, BoundRadio, BoundSource, FieldPair } from '@/components/forms';
import { Heading, Stack } from '@/components/ui';
import { parseNumber } from '@/lib/units';

import { estimateInto } from './estimateInto';
import type { StepProps } from './formTypes';

const ways = [
  { value: 'mean', label: 'As the mean of the day' },
  { value: 'window', label: 'As a window, from low to high' },
] as const;

/** How full the bank was on average. */
export function ChargeLevelFields({ form, bank }: StepProps) {
  const { control } = form;
  const [way, depthText] = useWatch({ control, name: ['conditions.socAs', 'conditions.depthFraction'] });
  const depth = parseNumber(depthText);
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
      <ChargeWindowEstimate
        limits={bank}
        depthFraction={depth === undefined ? null : depth / 100}
        onUse={({ low, high }) => {
          form.setValue('conditions.socAs', 'window', { shouldDirty: true });
          estimateInto(form)({ socLowFraction: low, socHighFraction: high });
        }}
      />
    </Stack>
  );
}
