import { useWatch } from 'react-hook-form';

import { BoundDate, BoundNumber, BoundRadio, BoundText, FieldPair } from '@/components/forms';
import { Divider, Heading, type Option, Stack } from '@/components/ui';
import { limits } from '@/lib/contract/limits';
import { calendarDateOf } from '@/lib/units';

import { CautionsFolded } from './Cautions';
import type { StepProps } from './formTypes';
import { LogPart } from './LogPart';

const entries = [
  {
    value: 'log',
    label: 'I have a log of it',
    hint: 'A CSV with time, voltage and current. The figures are taken from it, and you can look at them first.',
  },
  { value: 'typed', label: 'I type what the meter shows', hint: 'Ah, Wh, mean current and duration.' },
] as const;

/** Where the figures come from. The log's own fields stand outside the form, so that Enter in them sends nothing. */
export function EntryPart({ form, bank }: StepProps) {
  const entry = useWatch({ control: form.control, name: 'entry' });
  return (
    <Stack gap="l">
      <CautionsFolded />
      <BoundRadio control={form.control} name="entry" label="Where the figures come from" options={entries} />
      {entry === 'log' && <LogPart form={form} bank={bank} />}
    </Stack>
  );
}

const methods: readonly Option[] = [
  { value: 'countedDischarge', label: 'Counted while discharging', hint: 'From full down to the cut-off.' },
  {
    value: 'countedCharge',
    label: 'Counted while charging',
    hint: 'From the cut-off up to full. Less sure, because not all that goes in comes out.',
  },
];

/** The day, and the meter. */
export function TestStep({ form: { control }, bank }: StepProps) {
  return (
    <Stack gap="xl">
      <Divider />
      <Heading>The day and the meter</Heading>
      <BoundDate
        control={control}
        name="reading.testedOn"
        label="Day of the test"
        min={`${bank.firstUseMonth}-01`}
        max={calendarDateOf(new Date(), 'local')}
      />
      <BoundRadio
        control={control}
        name="reading.method"
        label="How the charge was counted"
        options={methods}
      />
      <BoundText
        control={control}
        name="reading.instrument"
        label="Meter"
        hint="What counted the charge, such as a shunt of 300 A with a display."
        maxLength={limits.nameLength.max}
      />
      <FieldPair>
        <BoundNumber
          control={control}
          name="reading.gainErrorFraction"
          label="Its own error"
          hint="Limit of error as its maker states it, of the reading. The same at each check."
          unit="%"
        />
        <BoundNumber
          control={control}
          name="reading.readingNoiseFraction"
          label="Scatter of its readings"
          hint="How far a repeated reading differs; 0.2 % if you don't know (common practice, no source)."
          unit="%"
        />
      </FieldPair>
    </Stack>
  );
}
