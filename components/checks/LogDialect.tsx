import { FieldPair } from '@/components/forms';
import { SelectField, Stack } from '@/components/ui';
import type { LogMapping } from '@/lib/contract/uploads';
import { timeFormatLabels } from '@/lib/measure';

const delimiters = [
  { value: ',', label: 'comma' },
  { value: ';', label: 'semicolon' },
  { value: '\t', label: 'tab' },
] as const;

const decimals = [
  { value: '.', label: 'point: 3.25' },
  { value: ',', label: 'comma: 3,25' },
] as const;

const signs = [
  { value: 'auto', label: 'as the voltage tells' },
  { value: 'positive', label: 'positive' },
  { value: 'negative', label: 'negative' },
] as const;

const gaps = [
  { value: 'count', label: 'counted from the readings at their ends' },
  { value: 'leaveOut', label: 'left out' },
] as const;

const timeFormats = Object.entries(timeFormatLabels).map(([value, label]) => ({ value, label }));

interface LogDialectProps {
  mapping: LogMapping;
  onChange: (mapping: LogMapping) => void;
}

/** How a log is written: marks, times, the sign of the current. */
export function LogDialect({ mapping, onChange }: LogDialectProps) {
  return (
    <Stack gap="l">
      <SelectField
        label="Times are written as"
        value={mapping.timeFormat}
        options={timeFormats}
        onChange={(timeFormat) => onChange({ ...mapping, timeFormat })}
      />
      <FieldPair>
        <SelectField
          label="Between columns"
          value={mapping.delimiter}
          options={delimiters}
          onChange={(delimiter) => onChange({ ...mapping, delimiter })}
        />
        <SelectField
          label="Decimal mark"
          value={mapping.decimal}
          options={decimals}
          onChange={(decimal) => onChange({ ...mapping, decimal })}
        />
        <SelectField
          label="Current while discharging"
          value={mapping.dischargeSign ?? 'auto'}
          options={signs}
          onChange={(dischargeSign) => onChange({ ...mapping, dischargeSign })}
        />
        <SelectField
          label="Charge in gaps"
          value={mapping.gaps ?? 'count'}
          options={gaps}
          onChange={(choice) => onChange({ ...mapping, gaps: choice })}
        />
      </FieldPair>
    </Stack>
  );
}
