import type { ReactNode } from 'react';
import { useWatch } from 'react-hook-form';

import { DepthEstimate, RateEstimate, TemperatureEstimate } from '@/components/estimates';
import { BoundNumber, BoundRadio, BoundSource, FieldDisclosure, FieldPair } from '@/components/forms';
import { Divider, Heading, type Option, Quiet, Stack } from '@/components/ui';
import { formatQuantity, parseNumber } from '@/lib/units';

import { BoundRate } from './BoundRate';
import { ChargeLevelFields } from './ChargeLevelFields';
import { CycleFields } from './CycleFields';
import { estimateInto, sizeOf } from './estimateInto';
import type { CheckControl, StepProps } from './formTypes';

/** How the bank lived since its previous check, or since new for a first one. */
export function LivedStep({ form, bank }: StepProps) {
  const { control } = form;
  const takeOver = estimateInto(form);
  const size = sizeOf(bank);
  return (
    <Stack gap="xl">
      <Stack gap="s">
        <BoundNumber
          control={control}
          name="conditions.depthFraction"
          label="Depth of a typical day"
          hint="Charge taken out on a typical day, of the rated capacity."
          unit="%"
          footer={<BoundSource control={control} name="sources.depthFraction" of="the depth" />}
        />
        <DepthEstimate bank={size} onUse={(percent) => takeOver({ depthFraction: percent })} />
      </Stack>
      <RateFields control={control} ratedAh={bank.ratedAh}>
        <RateEstimate bank={size} onUse={(rateIt) => takeOver({ dischargeIt: rateIt })} />
      </RateFields>
      <Divider />
      <TemperatureFields control={control}>
        <TemperatureEstimate
          climateBand={bank.climateBand}
          place={bank.place}
          onUse={(meanC) => {
            takeOver({ temperatureMeanC: meanC });
            form.setValue('conditions.temperatureOf', 'cells', { shouldDirty: true });
          }}
        />
      </TemperatureFields>
      <Divider />
      <ChargeLevelFields form={form} bank={bank} />
      <Divider />
      <CycleFields control={control} />
      <Divider />
      <FieldDisclosure
        control={control}
        names={['conditions.idleDays', 'conditions.idleSocFraction']}
        label="Days it stood idle"
      >
        <Stack gap="l">
          <FieldPair>
            <BoundNumber
              control={control}
              name="conditions.idleDays"
              label="Days idle"
              hint="Since the previous check, not cycled at all."
              unit="days"
              optional
              footer={<BoundSource control={control} name="sources.idleDays" of="the days idle" />}
            />
            <BoundNumber
              control={control}
              name="conditions.idleSocFraction"
              label="State of charge then"
              unit="%"
              optional
              footer={
                <BoundSource control={control} name="sources.idleSocFraction" of="the state of charge then" />
              }
            />
          </FieldPair>
        </Stack>
      </FieldDisclosure>
    </Stack>
  );
}

interface EstimatedFieldsProps {
  control: CheckControl;
  /** The helper below the field it is of. */
  children: ReactNode;
}

function RateFields({ control, ratedAh, children }: EstimatedFieldsProps & { ratedAh: number }) {
  const [discharge, charge, peak] = useWatch({
    control,
    name: ['conditions.dischargeIt', 'conditions.chargeIt', 'conditions.peakIt'],
  });
  const bankIt = `1 It of this bank is ${formatQuantity(ratedAh, 'A')}.`;
  return (
    <Stack gap="l">
      <Stack gap="s">
        <BoundRate
          control={control}
          field="dischargeIt"
          ratedAh={ratedAh}
          label="Current in use, mean"
          hint={itText(discharge, ratedAh) ?? `While discharging. ${bankIt}`}
          footer={<BoundSource control={control} name="sources.dischargeIt" of="the current in use" />}
        />
        {children}
      </Stack>
      <FieldPair>
        <BoundRate
          control={control}
          field="chargeIt"
          ratedAh={ratedAh}
          label="Charging, mean"
          hint={itText(charge, ratedAh)}
          optional
          footer={<BoundSource control={control} name="sources.chargeIt" of="the charging current" />}
        />
        <BoundRate
          control={control}
          field="peakIt"
          ratedAh={ratedAh}
          label="Peak in use"
          hint={itText(peak, ratedAh)}
          optional
          footer={<BoundSource control={control} name="sources.peakIt" of="the peak" />}
        />
      </FieldPair>
    </Stack>
  );
}

const itText = (typed: string, ratedAh: number) => {
  const rate = parseNumber(typed);
  if (rate === undefined) return undefined;
  return `${formatQuantity(rate, 'It', { decimals: 3 })}, ${formatQuantity(rate * ratedAh, 'A', { decimals: 1 })}.`;
};

const places: readonly Option[] = [
  { value: 'cells', label: 'Of the cells' },
  {
    value: 'air',
    label: 'Of the air around them',
    hint: 'Say so rather than guess; cells are warmer in use.',
  },
];

const months = [
  { field: 'temperatureHottestC', label: 'Hottest month' },
  { field: 'temperatureColdestC', label: 'Coldest month' },
  { field: 'coldestChargingC', label: 'Coldest while charging' },
] as const;

function TemperatureFields({ control, children }: EstimatedFieldsProps) {
  return (
    <Stack gap="l">
      <Heading>Temperature</Heading>
      <Stack gap="s">
        <BoundNumber
          control={control}
          name="conditions.temperatureMeanC"
          label="Mean over the year"
          unit="°C"
          units={['°C', '°F']}
          footer={<BoundSource control={control} name="sources.temperatureMeanC" of="the mean temperature" />}
        />
        {children}
      </Stack>
      <BoundRadio
        control={control}
        name="conditions.temperatureOf"
        label="These temperatures are"
        options={places}
      />
      <FieldDisclosure
        control={control}
        names={months.map(({ field }) => `conditions.${field}` as const)}
        label="Hottest and coldest"
      >
        <Stack gap="l">
          {months.map(({ field, label }) => (
            <BoundNumber
              key={field}
              control={control}
              name={`conditions.${field}`}
              label={label}
              unit="°C"
              units={['°C', '°F']}
              optional
              footer={<BoundSource control={control} name={`sources.${field}`} of={`"${label}"`} />}
            />
          ))}
          <Quiet>LFP cells are not charged below 0 °C.</Quiet>
        </Stack>
      </FieldDisclosure>
    </Stack>
  );
}
