import { useController, useWatch } from 'react-hook-form';

import { layoutLine } from '@/components/banks/bankWords';
import { BoundNumber, BoundSource, BoundText, FieldPair } from '@/components/forms';
import { Quiet, Stack } from '@/components/ui';

import { CautionsFolded } from './Cautions';
import type { CheckControl, StepProps } from './formTypes';
import { PhotoField } from './PhotoField';
import { currentRemark, meanVoltageRemark, type Remark, temperatureRemark } from './remarks';

/** A remark in its place: as an error is shown where figures disagree, in the hint's place where not. */
const beside = (remark: Remark | undefined, hint?: string) => ({
  doubt: remark?.isDoubt ? remark.text : undefined,
  hint: remark && !remark.isDoubt ? remark.text : hint,
});

/** The figures of the whole bank, each with what the other ones say of it. */
export function MeterStep({ form: { control }, bank }: StepProps) {
  const [capacityAh, energyKwh, meanCurrentA, duration, start, end, method] = useWatch({
    control,
    name: [
      'reading.capacityAh',
      'reading.energyWh',
      'reading.meanCurrentA',
      'reading.durationS',
      'reading.temperatureStartC',
      'reading.temperatureEndC',
      'reading.method',
    ],
  });
  const verb = method === 'countedCharge' ? 'put in' : 'taken out';
  const temperature = temperatureRemark(start, end);
  return (
    <Stack gap="xl">
      <BoundNumber
        control={control}
        name="reading.capacityAh"
        label={`Charge ${verb}`}
        note="whole bank"
        hint={`As the meter shows it, for the bank of ${layoutLine(bank)}.`}
        unit="Ah"
        footer={<BoundSource control={control} name="sources.capacityAh" of="the charge" />}
      />
      <BoundNumber
        control={control}
        name="reading.energyWh"
        label={`Energy ${verb}`}
        note="whole bank"
        {...beside(meanVoltageRemark({ capacityAh, energyKwh, method }, bank.series))}
        unit="kWh"
        units={['kWh', 'Wh']}
        footer={<BoundSource control={control} name="sources.energyWh" of="the energy" />}
      />
      <FieldPair>
        <BoundNumber
          control={control}
          name="reading.meanCurrentA"
          label={method === 'countedCharge' ? 'Charge current, mean' : 'Discharge current, mean'}
          {...beside(
            currentRemark({ capacityAh, meanCurrentA, duration }, bank.ratedAh),
            'While the load was on, pauses left out.',
          )}
          unit="A"
          footer={<BoundSource control={control} name="sources.meanCurrentA" of="the current" />}
        />
        <BoundText
          control={control}
          name="reading.durationS"
          label="Duration"
          hint="Hours and minutes: 4:42 or 4 h 42 min."
          unit="h:min"
          figures
          footer={<BoundSource control={control} name="sources.durationS" of="the duration" />}
        />
      </FieldPair>
      <Stack gap="s">
        <FieldPair>
          <BoundNumber
            control={control}
            name="reading.temperatureStartC"
            label="Cells at the start"
            unit="°C"
            units={['°C', '°F']}
            footer={
              <BoundSource
                control={control}
                name="sources.temperatureStartC"
                of="the temperature at the start"
              />
            }
          />
          <BoundNumber
            control={control}
            name="reading.temperatureEndC"
            label="Cells at the end"
            unit="°C"
            units={['°C', '°F']}
            footer={
              <BoundSource control={control} name="sources.temperatureEndC" of="the temperature at the end" />
            }
          />
        </FieldPair>
        <Quiet aria-live="polite">{temperature?.text ?? 'At the cells, not of the air around them.'}</Quiet>
      </Stack>
      <BoundPhoto control={control} bankId={bank.id} />
      <CautionsFolded />
    </Stack>
  );
}

function BoundPhoto({ control, bankId }: { control: CheckControl; bankId: string }) {
  const {
    field: { ref, value, onChange },
    fieldState: { error },
  } = useController({ control, name: 'photoId' });
  return (
    <PhotoField
      ref={ref}
      bankId={bankId}
      value={value || null}
      onChange={(photoId) => onChange(photoId ?? '')}
      error={error?.message}
    />
  );
}
