import { useState } from 'react';

import { quantityText } from '@/components/forms';
import { NumberField } from '@/components/ui';
import { limits } from '@/lib/contract/limits';

/** What can be noted while the test runs, under the names of the form's fields; units and limits only, nothing to hold it against. */
const fields = {
  highestCellAtFullV: { limit: limits.cellV, unit: 'V', shownPerStored: 1 },
  lowestCellAtFullV: { limit: limits.cellV, unit: 'V', shownPerStored: 1 },
  lowestCellAtEndV: { limit: limits.cellV, unit: 'V', shownPerStored: 1 },
  highestCellAtEndV: { limit: limits.cellV, unit: 'V', shownPerStored: 1 },
  temperatureStartC: { limit: limits.temperatureC, unit: '°C', shownPerStored: 1 },
  temperatureEndC: { limit: limits.temperatureC, unit: '°C', shownPerStored: 1 },
  capacityAh: { limit: limits.capacityAh, unit: 'Ah', shownPerStored: 1 },
  energyWh: { limit: limits.energyWh, unit: 'kWh', shownPerStored: 0.001 },
  meanCurrentA: { limit: limits.meanCurrentA, unit: 'A', shownPerStored: 1 },
} as const;

export type GuidedField = keyof typeof fields;

interface GuidedReadingProps {
  field: GuidedField;
  label: string;
  hint?: string;
  readings: Record<string, string>;
  onNote: (field: string, text: string) => void;
}

/** One reading noted on the way; it may be left for the form, but what is typed is held to its limits. */
export function GuidedReading({ field, label, hint, readings, onNote }: GuidedReadingProps) {
  const [isLeft, setIsLeft] = useState(false);
  const { limit, unit, shownPerStored } = fields[field];
  const value = readings[field] ?? '';
  const read = quantityText(limit, unit, shownPerStored).safeParse(value);
  const error = isLeft && value !== '' && !read.success ? read.error.issues[0]?.message : undefined;
  return (
    <NumberField
      label={label}
      hint={hint}
      value={value}
      unit={unit}
      onChange={(text) => onNote(field, text)}
      onBlur={() => setIsLeft(true)}
      error={error}
      optional
    />
  );
}
