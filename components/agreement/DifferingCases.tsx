import { type Column, Heading, Link, Quiet, Stack, Table, Text } from '@/components/ui';
import type { Agreement } from '@/lib/contract/agreement';
import { formatDate } from '@/lib/units';

import { verdictWords } from './verdictWords';

type Case = Agreement['differing'][number];

const withWords = (verdict: Case['first'], words: string) => (
  <Stack gap="hair">
    <Text>{verdictWords[verdict]}</Text>
    {words !== '' && <Quiet>{words}</Quiet>}
  </Stack>
);

const columns: Column<Case>[] = [
  {
    key: 'bank',
    title: 'Submission',
    cell: ({ checkId, pseudonym, cellType }) => (
      <Link href={`/screening/${checkId}`}>{`Bank ${pseudonym}, ${cellType.name}`}</Link>
    ),
  },
  { key: 'first', title: 'First decision', cell: ({ first, firstWords }) => withWords(first, firstWords) },
  {
    key: 'second',
    title: 'Second verdict',
    cell: ({ second, secondWords }) => withWords(second, secondWords),
  },
  { key: 'done', title: 'Looked at', cell: ({ doneAt }) => formatDate(doneAt.slice(0, 10)) },
];

/** The submissions on which two moderators did not find the same; the first decision stands on each. */
export function DifferingCases({ cases }: { cases: Case[] }) {
  return (
    <Stack gap="s">
      <Heading level={2}>Where they differ</Heading>
      {cases.length === 0 ? (
        <Quiet>On none so far.</Quiet>
      ) : (
        <Table
          caption="Submissions with two different verdicts"
          columns={columns}
          rows={cases}
          rowKey={({ checkId }) => checkId}
        />
      )}
      <Quiet>
        A second verdict changes nothing by itself. Recall a check, or talk it over, where it should.
      </Quiet>
    </Stack>
  );
}
