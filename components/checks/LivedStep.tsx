import { useWatch } from 'react-hook-form';

import { BoundNumber, BoundRadio, BoundSource, FieldDisclosure, FieldPair } from '@/components/forms';
import { Divider, Heading, type Option, Quiet, Stack } from '@/components/ui';
import { formatQuantity, parseNumber } from '@/lib/units';

import { BoundRate } from './BoundRate';
import { ChargeLevelFields } from './ChargeLevelFields';
import { CycleFields } from './CycleFields';
import type { CheckControl, StepProps } from './formTypes';

/** How the bank lived since its previous check, or since new for a first one. */
export function LivedStep({ form: { control }, bank }: StepProps) {
  return (
    <Stack gap="xl">
      <BoundNumber
        control={control}
        name="conditions.depthFraction"
        label="Depth of a typical day"
        hint="Charge taken out on a typical day, of the rated capacity."
        unit="%"
        footer={<BoundSource control={control} name="sources.depthFraction" of="the depth" />}
      />
      <RateFields control={control} ratedAh={bank.ratedAh} />
      <Divider />
      <TemperatureFields control={control} />
      <Divider />
      <ChargeLevelFields control={control} />
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

function RateFields({ control, ratedAh }: { control: CheckControl; ratedAh: number }) {
  const [discharge, charge, peak] = useWatch({
    control,
    name: ['conditions.dischargeIt', 'conditions.chargeIt', 'conditions.peakIt'],
  });
  const bankIt = `1 It of this bank is ${formatQuantity(ratedAh, 'A')}.`;
  return (
    <Stack gap="l">
      <BoundRate
        control={control}
        field="dischargeIt"
        ratedAh={ratedAh}
        label="Current in use, mean"
        hint={itText(discharge, ratedAh) ?? `While discharging. ${bankIt}`}
        footer={<BoundSource control={control} name="sources.dischargeIt" of="the current in use" />}
      />
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

function TemperatureFields({ control }: { control: CheckControl }) {
  return (
    <Stack gap="l">
      <Heading>Temperature</Heading>
      <BoundNumber
        control={control}
        name="conditions.temperatureMeanC"
        label="Mean over the year"
        unit="°C"
        units={['°C', '°F']}
        footer={<BoundSource control={control} name="sources.temperatureMeanC" of="the mean temperature" />}
      />
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
