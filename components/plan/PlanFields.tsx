import { useEffect } from 'react';

import { currencyOptions } from '@/components/banks/currencies';
import { BoundNumber, BoundRadio, BoundSelect, FieldPair, Form, useValidatedForm } from '@/components/forms';
import { Heading, Stack, type Option } from '@/components/ui';
import type { CellTypeBrief } from '@/lib/contract/banks';

import { LoadsPart } from './LoadsPart';
import { planSchema, type PlanText } from './planForm';

interface PlanFieldsProps {
  plan: PlanText;
  onChange: (plan: PlanText) => void;
  cellTypes: readonly CellTypeBrief[];
}

/** The inputs of one plan. Every change is told; what can't be read says so beside its field. */
export function PlanFields({ plan, onChange, cellTypes }: PlanFieldsProps) {
  const form = useValidatedForm(planSchema, plan);
  const { control, subscribe, trigger } = form;
  useEffect(
    () =>
      subscribe({
        formState: { values: true },
        callback: ({ values }) => onChange(values),
      }),
    [subscribe, onChange],
  );
  // An address may carry what can't be read: it is said at once.
  useEffect(() => void trigger(), [trigger]);
  const money = plan.currency;
  const options: Option[] = [
    { value: '', label: 'The pool’s average' },
    ...cellTypes.map(({ id, maker, name }) => ({ value: id, label: `${name}, ${maker}` })),
  ];
  return (
    <Form label="Your plan" onSubmit={() => undefined}>
      <Stack gap="m">
        <Heading>The night</Heading>
        <FieldPair>
          <BoundNumber
            control={control}
            name="night"
            label="Energy each night"
            unit="kWh"
            hint="What the loads use, for example 6."
          />
          <BoundNumber control={control} name="hours" label="Drawn over" unit="h" hint="1 to 24." />
        </FieldPair>
        <LoadsPart onUse={(kwh) => form.setValue('night', kwh, { shouldValidate: true })} />
        <BoundNumber
          control={control}
          name="peak"
          label="Highest draw"
          unit="W"
          hint="All loads that run at once."
        />
      </Stack>
      <Stack gap="m">
        <Heading>The bank</Heading>
        <BoundSelect control={control} name="cell" label="Cell type" options={options} />
        <FieldPair>
          <BoundNumber
            control={control}
            name="size"
            label="Rated energy"
            unit="kWh"
            hint="Rated Ah × nominal V × cells / 1,000."
          />
          <BoundNumber
            control={control}
            name="usable"
            label="Usable between the limits"
            unit="%"
            hint="Of what it holds, 10 to 100."
          />
        </FieldPair>
        <FieldPair>
          <BoundNumber
            control={control}
            name="heat"
            label="Mean cell temperature"
            unit="°C"
            hint="Over the year, at the cells."
          />
          <BoundNumber
            control={control}
            name="level"
            label="Mean charge level"
            unit="%"
            hint="Half full on average is 50."
          />
        </FieldPair>
        <BoundRadio
          control={control}
          name="clamped"
          label="Clamping"
          options={[
            { value: 'no', label: 'Not clamped' },
            { value: 'yes', label: 'Clamped' },
          ]}
        />
      </Stack>
      <Stack gap="m">
        <Heading>The money</Heading>
        <BoundSelect control={control} name="currency" label="Currency" options={currencyOptions()} />
        <FieldPair>
          <BoundNumber control={control} name="cells" label="Cells, all together" unit={money} />
          <BoundNumber
            control={control}
            name="other"
            label="Other parts"
            unit={money}
            hint="BMS, fuse, cabling, share of the inverter."
          />
        </FieldPair>
        <FieldPair>
          <BoundNumber
            control={control}
            name="charging"
            label="A kWh charged costs"
            unit={money}
            hint="Or would have earned."
          />
          <BoundNumber
            control={control}
            name="tariff"
            label="A kWh delivered saves"
            unit={money}
            hint="What you would pay otherwise."
          />
        </FieldPair>
        <FieldPair>
          <BoundNumber
            control={control}
            name="efficiency"
            label="Round-trip efficiency"
            unit="%"
            hint="Delivered / charged, 50 to 100."
          />
          <BoundNumber
            control={control}
            name="discount"
            label="Discount rate"
            unit="%"
            hint="A year, above inflation."
          />
        </FieldPair>
        <FieldPair>
          <BoundNumber control={control} name="upkeep" label="Upkeep a year" unit={money} />
          <BoundNumber
            control={control}
            name="fixture"
            label="A clamping fixture costs"
            unit={money}
            optional
          />
        </FieldPair>
      </Stack>
    </Form>
  );
}
