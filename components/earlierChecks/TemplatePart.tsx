import { useState } from 'react';

import { Banner, Button, type Column, Disclosure, Heading, Row, Stack, Table, Text } from '@/components/ui';
import { saveEarlierTemplate } from '@/lib/client/earlierChecks';
import { ApiError } from '@/lib/client/http';
import {
  allowedWords,
  type EarlierColumn,
  earlierColumns,
  headersOf,
  sourceColumns,
} from '@/lib/contract/earlierColumns';

interface ColumnLine {
  name: string;
  meaning: string;
  allowed: string;
  need: string;
}

const lineOf = (column: EarlierColumn): ColumnLine => ({
  name: headersOf(column).join(' or '),
  meaning: column.meaning,
  allowed: allowedWords(column),
  need: column.isOptional ? 'may stay empty' : 'needed',
});

const lines: ColumnLine[] = [
  ...earlierColumns.map(lineOf),
  ...sourceColumns.map(({ name, meaning }) => ({
    ...{ name, meaning, allowed: 'names of columns, with a space between', need: 'may stay empty' },
  })),
];

const columns: Column<ColumnLine>[] = [
  { key: 'name', title: 'Column', cell: ({ name }) => name },
  { key: 'meaning', title: 'What it holds', cell: ({ meaning }) => meaning },
  { key: 'allowed', title: 'Range', cell: ({ allowed }) => allowed },
  { key: 'need', title: 'Needed', cell: ({ need }) => need },
];

/** The empty file to fill in, and what each of its columns holds. */
export function TemplatePart() {
  const [busy, setBusy] = useState<'point' | 'comma' | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const save = async (style: 'point' | 'comma') => {
    setBusy(style);
    setProblem(null);
    try {
      await saveEarlierTemplate(style);
    } catch (error) {
      setProblem(error instanceof ApiError ? error.message : 'The template could not be saved. Try again.');
    }
    setBusy(null);
  };
  return (
    <Stack gap="m">
      <Heading>1. Fill in the template</Heading>
      <Text>
        One check in a row, one column for each figure, its unit in the column&apos;s name. Any program for
        tables opens it; save it as CSV again. Columns that may stay empty may also be left out. With decimal
        commas, values are set apart by semicolons.
      </Text>
      <Row>
        <Button label="Template, decimal point" onPress={() => void save('point')} busy={busy === 'point'} />
        <Button label="Template, decimal comma" onPress={() => void save('comma')} busy={busy === 'comma'} />
      </Row>
      {problem && <Banner kind="error">{problem}</Banner>}
      <Disclosure label="What each column holds">
        <Table caption="Columns of the template" columns={columns} rows={lines} rowKey={({ name }) => name} />
      </Disclosure>
    </Stack>
  );
}
