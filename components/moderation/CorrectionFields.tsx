import { NumberField, Quiet, Stack } from '@/components/ui';
import type { Correctable } from '@/lib/contract/checks';
import type { Submission } from '@/lib/contract/moderation';
import { formatNumber, parseNumber } from '@/lib/units';

import { proposedCapacityAh } from './submissionWords';

/** As typed, by figure; what is left empty stays as the owner gave it. */
export type Corrections = Partial<Record<keyof Correctable, string>>;

interface Figure {
  key: keyof Correctable;
  label: string;
  unit: string;
  /** Stored value / typed value. */
  factor: number;
}

const figures: readonly Figure[] = [
  { key: 'capacityAh', label: 'Charge', unit: 'Ah', factor: 1 },
  { key: 'energyWh', label: 'Energy', unit: 'kWh', factor: 1000 },
  { key: 'meanCurrentA', label: 'Mean current', unit: 'A', factor: 1 },
  { key: 'durationS', label: 'Duration', unit: 'h', factor: 3600 },
  { key: 'temperatureStartC', label: 'Temperature at the start', unit: '°C', factor: 1 },
  { key: 'temperatureEndC', label: 'Temperature at the end', unit: '°C', factor: 1 },
];

interface CorrectionFieldsProps {
  submission: Submission;
  values: Corrections;
  onChange: (values: Corrections) => void;
  errors: Record<string, string>;
}

/** The figures of a reading that can be put right, each with what the owner gave. */
export function CorrectionFields({ submission, values, onChange, errors }: CorrectionFieldsProps) {
  const { reading } = submission.fields;
  const proposed = proposedCapacityAh(submission);
  return (
    <Stack gap="m">
      <Quiet>Fill in what is to be corrected; the rest stays as it is.</Quiet>
      {figures.map(({ key, label, unit, factor }) => {
        const given = `Given: ${formatNumber(reading[key] / factor, { significant: 5 })} ${unit}.`;
        const likely =
          key === 'capacityAh' && proposed !== undefined
            ? ` Likely meant: ${formatNumber(proposed, { significant: 5 })} ${unit}.`
            : '';
        return (
          <NumberField
            key={key}
            label={label}
            hint={given + likely}
            optional
            unit={unit}
            value={values[key] ?? ''}
            onChange={(text) => onChange({ ...values, [key]: text })}
            error={errors[`corrections.${key}`]}
          />
        );
      })}
      {errors.corrections && <Quiet role="alert">{errors.corrections}</Quiet>}
    </Stack>
  );
}

/** The corrections as stored, and beside which field something can't be read. */
export function readCorrections(typed: Corrections): { values: Correctable; errors: Record<string, string> } {
  const values: Correctable = {};
  const errors: Record<string, string> = {};
  for (const { key, factor } of figures) {
    const text = typed[key]?.trim() ?? '';
    if (text === '') continue;
    const value = parseNumber(text);
    if (value === undefined) errors[`corrections.${key}`] = 'Enter a number.';
    else values[key] = value * factor;
  }
  return { values, errors };
}
