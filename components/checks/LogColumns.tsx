import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Banner, Button, Disclosure, Figure, Quiet, SelectField, Stack, Text } from '@/components/ui';
import { useRemapLog } from '@/lib/client/uploads';
import type { LogMapping, RecognisedLog, Upload } from '@/lib/contract/uploads';
import { logQuantities, quantityLabels } from '@/lib/measure';

import { LogDialect } from './LogDialect';
import { type Quantity, unitsOf, withColumn } from './logMapping';
import { remapProblem } from './remapProblem';

interface LogColumnsProps {
  upload: Upload;
  recognised: RecognisedLog;
  isOpen?: boolean;
}

const notUsed = 'notUsed';
const held = [
  { value: notUsed, label: 'not used' },
  ...logQuantities.map((quantity) => ({ value: quantity, label: quantityLabels[quantity] })),
];

/** The columns as they were read, to be looked at and corrected; the log is then read again. */
export function LogColumns({ upload, recognised, isOpen = false }: LogColumnsProps) {
  return (
    <Disclosure label="Columns as they were read" startsOpen={isOpen}>
      <ColumnList key={JSON.stringify(recognised.mapping)} upload={upload} recognised={recognised} />
    </Disclosure>
  );
}

function ColumnList({ upload, recognised }: LogColumnsProps) {
  const [mapping, setMapping] = useState<LogMapping>(recognised.mapping);
  const remap = useRemapLog(upload.id);
  const isChanged = mapping !== recognised.mapping;
  return (
    <Stack gap="m">
      <View role="list" aria-label="Columns">
        {recognised.header.map((name, index) => (
          <ColumnLine
            key={index}
            name={name}
            samples={recognised.sampleRows.map((row) => row[index]?.trim() ?? '')}
            column={mapping.columns.find((column) => column.index === index)}
            onChange={(next) => setMapping(withColumn(mapping, index, next))}
          />
        ))}
      </View>
      <LogDialect mapping={mapping} onChange={setMapping} />
      {remap.isError && <Banner kind="error">{remapProblem(remap.error)}</Banner>}
      <Button
        label="Read it again so"
        busy={remap.isPending}
        disabled={!isChanged}
        onPress={() => remap.mutate({ ...mapping, window: null })}
      />
      {!isChanged && <Quiet>Change what is wrong above, then have it read again.</Quiet>}
    </Stack>
  );
}

interface ColumnLineProps {
  name: string;
  samples: string[];
  column: LogMapping['columns'][number] | undefined;
  onChange: (held: { quantity: Quantity; unit?: string } | null) => void;
}

const shownSamples = 2;

function ColumnLine({ name, samples, column, onChange }: ColumnLineProps) {
  const units = column ? unitsOf[column.quantity] : [];
  return (
    <View role="listitem" style={styles.column}>
      <View style={styles.name}>
        <Text weight="strong">{name}</Text>
        <Figure size="small" tone="quiet">
          {samples.filter(Boolean).slice(0, shownSamples).join(' · ') || 'empty'}
        </Figure>
      </View>
      <View role="group" aria-label={name} style={styles.choices}>
        <View style={styles.quantity}>
          <SelectField
            label="Holds"
            value={column?.quantity ?? notUsed}
            options={held}
            onChange={(value) => onChange(value === notUsed ? null : { quantity: value as Quantity })}
          />
        </View>
        <View style={styles.unit}>
          {column && units.length > 0 && (
            <SelectField
              label="Unit"
              value={column.unit}
              options={units.map((unit) => ({ value: unit, label: unit }))}
              onChange={(unit) => onChange({ quantity: column.quantity, unit })}
            />
          )}
        </View>
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  column: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    columnGap: space.l,
    rowGap: space.s,
    paddingVertical: space.m,
    borderBottomWidth: 1,
    borderBottomColor: color.line,
  },
  name: { flexGrow: 1, flexShrink: 1, flexBasis: 180, minWidth: 0 },
  choices: { flexDirection: 'row', gap: space.s, flexGrow: 1, flexShrink: 1, flexBasis: 280, minWidth: 0 },
  quantity: { flexGrow: 1, flexShrink: 1, flexBasis: 150, minWidth: 0 },
  unit: { width: 96 },
});
