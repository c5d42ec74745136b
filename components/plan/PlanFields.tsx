import { useEffect } from 'react';

import { currencyOptions } from '@/components/banks/currencies';
import { BoundNumber, BoundRadio, BoundSelect, FieldPair, Form, useValidatedForm } from '@/components/forms';
import { Heading, Stack, type Option } from '@/components/ui';
import type { CellTypeBrief } from '@/lib/contract/banks';

import { LoadsPart } from './LoadsPart';
import { averageCell, planSchema, type PlanText } from './planForm';

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
    { value: averageCell, label: 'The pool’s average' },
    ...cellTypes.map(({ id, maker, name }) => ({ value: id, label: `${name}, ${maker}` })),
  ];
  return (
    <Form label="Your plan" onSubmit={() => undefined}>
      <Stack gap="m">
        <Heading>The night</Heading>
        <FieldPair isNarrow>
          <BoundNumber
            control={control}
            name="night"
            label="Energy a night"
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
        <FieldPair isNarrow>
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
            label="Usable part"
            unit="%"
            hint="Between the limits, of what it holds."
          />
        </FieldPair>
        <FieldPair isNarrow>
          <BoundNumber
            control={control}
            name="heat"
            label="Cell temperature"
            unit="°C"
            hint="Mean over the year, at the cells."
          />
          <BoundNumber
            control={control}
            name="level"
            label="Charge level"
            unit="%"
            hint="Mean over the year; half full is 50."
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
        <FieldPair isNarrow>
          <BoundNumber control={control} name="cells" label="Cells, together" unit={money} />
          <BoundNumber
            control={control}
            name="other"
            label="Other parts"
            unit={money}
            hint="BMS, fuse, cabling, share of the inverter."
          />
        </FieldPair>
        <FieldPair isNarrow>
          <BoundNumber
            control={control}
            name="charging"
            label="A kWh charged"
            unit={money}
            hint="What it costs, or would have earned."
          />
          <BoundNumber
            control={control}
            name="tariff"
            label="A kWh delivered"
            unit={money}
            hint="What it saves: the tariff."
          />
        </FieldPair>
        <FieldPair isNarrow>
          <BoundNumber
            control={control}
            name="efficiency"
            label="Round trip"
            unit="%"
            hint="Energy delivered / charged."
          />
          <BoundNumber
            control={control}
            name="discount"
            label="Discount rate"
            unit="%"
            hint="A year, above inflation."
          />
        </FieldPair>
        <FieldPair isNarrow>
          <BoundNumber control={control} name="upkeep" label="Upkeep a year" unit={money} />
          <BoundNumber control={control} name="fixture" label="A fixture" unit={money} optional />
        </FieldPair>
      </Stack>
    </Form>
  );
}
