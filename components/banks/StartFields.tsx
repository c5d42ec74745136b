import { BoundMonth, BoundNumber, BoundRadio, BoundSelect, BoundSource, FieldPair } from '@/components/forms';
import { Heading, type Option, Stack } from '@/components/ui';

import type { BankFieldsProps } from './bankFormTypes';
import { optionsOf } from './bankWords';
import { currencyOptions } from './currencies';

const bought: Option[] = optionsOf({ new: 'New', used: 'Used', unknown: 'Not known' }).map((option) => ({
  ...option,
  hint: option.value === 'new' ? undefined : 'You get your own curve; pooled lives leave it out.',
}));

/** How the cells were bought, what they held at first, what they cost. */
export function StartFields({ form: { control } }: BankFieldsProps) {
  return (
    <Stack gap="xl">
      <BoundRadio control={control} name="bought" label="Bought" options={bought} />
      <BoundNumber
        control={control}
        name="startCapacityAh"
        label="Capacity at the start"
        note="whole bank"
        hint="Of your own first check, at 25 °C and 0.2 It. Leave it empty if you made none: the seller's figure is not a measurement."
        unit="Ah"
        optional
        footer={
          <BoundSource control={control} name="sources.startCapacityAh" of="the capacity at the start" />
        }
      />
      <Stack gap="l">
        <Heading>What the cells cost</Heading>
        <FieldPair>
          <BoundNumber
            control={control}
            name="priceMinor"
            label="Price of one cell"
            hint="With tax, without delivery."
            unit=""
            optional
          />
          <BoundSelect
            control={control}
            name="priceCurrency"
            label="Currency"
            options={currencyOptions()}
            prompt="Choose the currency"
            optional
          />
          <BoundMonth control={control} name="priceMonth" label="Month it was paid" optional min="1990-01" />
        </FieldPair>
      </Stack>
    </Stack>
  );
}
