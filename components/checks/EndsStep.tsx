import { useWatch } from 'react-hook-form';

import { BoundNumber, BoundRadio, BoundSource, BoundText, FieldPair } from '@/components/forms';
import { Divider, Heading, Quiet, Stack } from '@/components/ui';

import { CautionsFolded } from './Cautions';
import { dischargeEnds, fullChargeEnds } from './endChoices';
import type { CheckControl, StepProps } from './formTypes';
import { endVoltageRemark } from './remarks';

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
