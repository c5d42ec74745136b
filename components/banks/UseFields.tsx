import { BoundNumber, BoundSelect, BoundSource, FieldPair } from '@/components/forms';
import { Heading, type Option, Quiet, Stack } from '@/components/ui';

import type { BankFieldsProps } from './bankFormTypes';
import { unsaid } from './bankValues';
import { climateBandWords, optionsOf, placeWords } from './bankWords';

const places: Option[] = [unsaid, ...optionsOf(placeWords)];
const climates: Option[] = [unsaid, ...optionsOf(climateBandWords)];

const voltages = [
  {
    name: 'chargeLimitV',
    label: 'Charge ends at',
    hint: 'Per cell, as the charger is set. 3.45 V is usual.',
  },
  { name: 'dischargeLimitV', label: 'Discharge ends at', hint: 'Per cell, as the inverter is set.' },
  { name: 'bmsHighTripV', label: 'BMS trips above', hint: 'Per cell; the last protection while charging.' },
  { name: 'bmsLowTripV', label: 'BMS trips below', hint: 'Per cell; the last protection while discharging.' },
] as const;

/** Where a bank stands and the limits it is kept within. */
export function UseFields({ form: { control } }: BankFieldsProps) {
  return (
    <Stack gap="xl">
      <FieldPair>
        <BoundSelect
          control={control}
          name="place"
          label="Place"
          options={places}
          prompt="Not said"
          optional
        />
        <BoundSelect
          control={control}
          name="climateBand"
          label="Climate"
          hint="Mean of the year outdoors, day and night."
          options={climates}
          prompt="Not said"
          optional
        />
      </FieldPair>
      <Stack gap="l">
        <Heading>Limits set</Heading>
        <Quiet>
          The limits of the cells&apos; maker come first. How deep and how fast the bank is used is asked with
          each check, as it changes from year to year.
        </Quiet>
        <FieldPair>
          {voltages.map(({ name, label, hint }) => (
            <BoundNumber
              key={name}
              control={control}
              name={name}
              label={label}
              hint={hint}
              unit="V"
              optional
              footer={<BoundSource control={control} name={`sources.${name}`} of={`"${label}"`} />}
            />
          ))}
        </FieldPair>
      </Stack>
    </Stack>
  );
}
