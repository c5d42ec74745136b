import { useWatch } from 'react-hook-form';

import { BoundNumber, BoundSelect, BoundSource } from '@/components/forms';
import { Heading, type Option, Quiet, Stack } from '@/components/ui';

import type { CheckControl } from './formTypes';

const kinds: readonly Option[] = [
  { value: 'efc', label: 'Full cycles since new' },
  { value: 'ah', label: 'Ah discharged since new' },
  { value: 'kwh', label: 'kWh discharged since new' },
  { value: 'none', label: 'There is no counter' },
];

const units: Record<string, string> = { efc: 'cycles', ah: 'Ah', kwh: 'kWh' };

/** What the bank has carried: a counter since new, or how often it is cycled. */
export function CycleFields({ control }: { control: CheckControl }) {
  const kind = useWatch({ control, name: 'conditions.counterKind' });
  const unit = units[kind];
  return (
    <Stack gap="l">
      <Heading>Cycles</Heading>
      <BoundSelect
        control={control}
        name="conditions.counterKind"
        label="A counter shows"
        prompt="Choose what it counts"
        options={kinds}
      />
      {unit !== undefined && (
        <BoundNumber
          key={unit}
          control={control}
          name="conditions.counterValue"
          label="Counter, since new"
          note="whole bank"
          hint="What was taken out, not what was put in."
          unit={unit}
          footer={<BoundSource control={control} name="sources.counterValue" of="the counter" />}
        />
      )}
      <BoundNumber
        control={control}
        name="conditions.cyclesPerDay"
        label="Cycles a day"
        hint={
          unit === undefined
            ? 'Of the typical depth above; 1 for a bank that is emptied and filled once a day.'
            : 'Of the typical depth above. The counter is held against it when everything is entered.'
        }
        unit="a day"
        optional={unit !== undefined}
        footer={<BoundSource control={control} name="sources.cyclesPerDay" of="the cycles a day" />}
      />
      <Quiet>Since the previous check, or since new for a first one; the counter always since new.</Quiet>
    </Stack>
  );
}
