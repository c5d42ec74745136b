import type { ComponentType } from 'react';
import { useWatch } from 'react-hook-form';

import {
  BoundMonth,
  BoundNumber,
  BoundSelect,
  BoundSource,
  FieldDisclosure,
  FieldPair,
} from '@/components/forms';
import { type Option, Quiet, Stack } from '@/components/ui';

import type { BankControl } from './BankForm';
import { type BankGroup, bankGroups } from './bankGroups';
import { unsaid } from './bankValues';
import { climateBandWords, optionsOf, placeWords } from './bankWords';
import { currencyOptions } from './currencies';

const places: Option[] = [unsaid, ...optionsOf(placeWords)];
const climates: Option[] = [unsaid, ...optionsOf(climateBandWords)];

interface GroupProps {
  control: BankControl;
}

const labels: Record<BankGroup, string> = {
  start: 'When it was made, and what it held at first',
  limits: 'Limits set on the charger and the BMS',
  clamping: 'Clamping force and gaps',
  place: 'Where it stands',
  price: 'What the cells cost',
};

const groups: readonly { group: BankGroup; Fields: ComponentType<GroupProps> }[] = [
  { group: 'start', Fields: StartFields },
  { group: 'limits', Fields: LimitFields },
  { group: 'clamping', Fields: ClampingFields },
  { group: 'place', Fields: PlaceFields },
  { group: 'price', Fields: PriceFields },
];

/** What is wanted or optional, folded away until it is asked for, has something in it, or holds an error. */
export function BankOptionalFields({ control }: GroupProps) {
  return (
    <Stack gap="xs">
      <Quiet>The rest is wanted, not required. It makes your checks say more.</Quiet>
      {groups.map(({ group, Fields }) => (
        <FieldDisclosure key={group} control={control} names={bankGroups[group]} label={labels[group]}>
          <Stack gap="l">
            <Fields control={control} />
          </Stack>
        </FieldDisclosure>
      ))}
    </Stack>
  );
}

function StartFields({ control }: GroupProps) {
  return (
    <>
      <BoundMonth control={control} name="madeMonth" label="Month of manufacture" optional min="1990-01" />
      <BoundNumber
        control={control}
        name="startCapacityAh"
        label="Capacity at the start"
        note="whole bank"
        hint="Of your own first check, at 25 °C and 0.2 It."
        unit="Ah"
        optional
        footer={
          <BoundSource control={control} name="sources.startCapacityAh" of="the capacity at the start" />
        }
      />
    </>
  );
}

const voltages = [
  { name: 'chargeLimitV', label: 'Charge ends at' },
  { name: 'dischargeLimitV', label: 'Discharge ends at' },
  { name: 'bmsHighTripV', label: 'BMS trips above' },
  { name: 'bmsLowTripV', label: 'BMS trips below' },
] as const;

function LimitFields({ control }: GroupProps) {
  return (
    <>
      <Quiet>Per cell. Stay within the limits of the cells&apos; maker.</Quiet>
      <FieldPair>
        {voltages.map(({ name, label }) => (
          <BoundNumber
            key={name}
            control={control}
            name={name}
            label={label}
            unit="V"
            optional
            footer={<BoundSource control={control} name={`sources.${name}`} of={`"${label}"`} />}
          />
        ))}
      </FieldPair>
    </>
  );
}

function ClampingFields({ control }: GroupProps) {
  const clamping = useWatch({ control, name: 'clamping' });
  return (
    <>
      {clamping === 'none' ? (
        <Quiet>Force and torque are asked of clamped cells only.</Quiet>
      ) : (
        <FieldPair>
          <BoundNumber
            control={control}
            name="clampForceN"
            label="Clamping force"
            hint="On the cells' large face."
            unit="N"
            units={['N', 'kgf', 'lbf']}
            optional
            footer={<BoundSource control={control} name="sources.clampForceN" of="the clamping force" />}
          />
          <BoundNumber
            control={control}
            name="clampTorqueNm"
            label="Torque"
            hint="Of each rod's nut."
            unit="N·m"
            optional
            footer={<BoundSource control={control} name="sources.clampTorqueNm" of="the torque" />}
          />
        </FieldPair>
      )}
      <BoundNumber
        control={control}
        name="spacingMm"
        label="Gap between cells"
        unit="mm"
        units={['mm', 'in']}
        optional
        footer={<BoundSource control={control} name="sources.spacingMm" of="the gap" />}
      />
    </>
  );
}

function PlaceFields({ control }: GroupProps) {
  return (
    <>
      <Quiet>No address and no region is asked for: a kind of place, and one of five bands of climate.</Quiet>
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
          hint="Mean of the year outdoors."
          options={climates}
          prompt="Not said"
          optional
        />
      </FieldPair>
    </>
  );
}

function PriceFields({ control }: GroupProps) {
  return (
    <>
      <FieldPair>
        <BoundNumber control={control} name="priceMinor" label="Price of one cell" unit="" optional />
        <BoundSelect
          control={control}
          name="priceCurrency"
          label="Currency"
          options={currencyOptions()}
          prompt="Choose the currency"
          optional
        />
      </FieldPair>
      <BoundMonth control={control} name="priceMonth" label="Month it was paid" optional min="1990-01" />
    </>
  );
}
