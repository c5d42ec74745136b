import { useWatch } from 'react-hook-form';

import { BoundNumber, BoundRadio, BoundSource, BoundText, FieldPair } from '@/components/forms';
import { Divider, Heading, type Option, Quiet, Stack } from '@/components/ui';

import { CautionsFolded } from './Cautions';
import { dischargeEndWords, fullChargeEndWords } from './endWords';
import type { CheckControl, StepProps } from './formTypes';
import { endVoltageRemark } from './remarks';

const fullChargeEnds: readonly Option[] = [
  { value: 'voltageAndTail', label: fullChargeEndWords.voltageAndTail, hint: 'As the cells call for it.' },
  { value: 'bms', label: fullChargeEndWords.bms, hint: 'It stopped the charge by itself.' },
  { value: 'time', label: fullChargeEndWords.time, hint: 'A clock or a person stopped it.' },
];

const dischargeEnds: readonly Option[] = [
  { value: 'lowestCell', label: dischargeEndWords.lowestCell, hint: 'The way a test should end.' },
  { value: 'bankVoltage', label: dischargeEndWords.bankVoltage },
  {
    value: 'bmsTrip',
    label: dischargeEndWords.bmsTrip,
    hint: 'It counts all the same. Next time stop the load before it.',
  },
  { value: 'load', label: dischargeEndWords.load, hint: 'Such as an inverter at its own limit.' },
];

/** How full the bank was at first, and how empty at the end. */
export function EndsStep({ form: { control }, bank }: StepProps) {
  const lowestAtEnd = useWatch({ control, name: 'reading.lowestCellAtEndV' });
  const isString = bank.series > 1;
  return (
    <Stack gap="xl">
      <Heading>The full charge before</Heading>
      <BoundRadio
        control={control}
        name="reading.fullChargeEndedBy"
        label="The charge was ended by"
        options={fullChargeEnds}
      />
      <FieldPair>
        <CellVoltage
          control={control}
          field="highestCellAtFullV"
          label={isString ? 'Highest cell at full' : 'Cell at full'}
          hint="At the end of the charge, before the rest."
        />
        {isString && (
          <CellVoltage
            control={control}
            field="lowestCellAtFullV"
            label="Lowest cell at full"
            hint="At the same moment."
            optional
          />
        )}
      </FieldPair>
      <BoundNumber
        control={control}
        name="reading.restMinutes"
        label="Rest after it"
        hint="Until the load was put on."
        unit="min"
        units={['min', 'h']}
        optional
      />
      <Divider />
      <Heading>The end of the discharge</Heading>
      <BoundRadio
        control={control}
        name="reading.dischargeEndedBy"
        label="The discharge was ended by"
        options={dischargeEnds}
      />
      <FieldPair>
        <CellVoltage
          control={control}
          field="lowestCellAtEndV"
          label={isString ? 'Lowest cell at the end' : 'Cell at the end'}
          hint={endVoltageRemark(lowestAtEnd)?.text ?? 'The last reading with the load still on.'}
        />
        {isString && (
          <CellVoltage
            control={control}
            field="highestCellAtEndV"
            label="Highest cell at the end"
            hint="At the same moment."
            optional
          />
        )}
      </FieldPair>
      {isString && (
        <>
          <BoundText
            control={control}
            name="reading.endedByCell"
            label="Which cell was lowest"
            hint="Its number or name, so that next year's can be held against it."
            maxLength={40}
            optional
          />
          <Quiet>
            A series bank ends with its weakest cell; how far the cells lie apart becomes a part of the
            uncertainty.
          </Quiet>
        </>
      )}
      <CautionsFolded />
    </Stack>
  );
}

interface CellVoltageProps {
  control: CheckControl;
  field: 'highestCellAtFullV' | 'lowestCellAtFullV' | 'lowestCellAtEndV' | 'highestCellAtEndV';
  label: string;
  hint?: string;
  optional?: boolean;
}

function CellVoltage({ control, field, label, ...rest }: CellVoltageProps) {
  return (
    <BoundNumber
      {...rest}
      control={control}
      name={`reading.${field}`}
      label={label}
      unit="V"
      units={['V', 'mV']}
      footer={<BoundSource control={control} name={`sources.${field}`} of={`"${label}"`} />}
    />
  );
}
