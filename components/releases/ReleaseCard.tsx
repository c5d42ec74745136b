import { type Column, Heading, Link, Quiet, Stack, Table, Text } from '@/components/ui';
import type { Release, ReleaseFile } from '@/lib/contract/releases';

import { changeWords, evidenceWords, fileAddress, sizeWords } from './releaseWords';

const columnsOf = (number: number): Column<ReleaseFile>[] => [
  {
    key: 'name',
    title: 'File',
    cell: ({ name }) => (
      <Link href={fileAddress(number, name)} download={name}>
        {name}
      </Link>
    ),
  },
  { key: 'size', title: 'Size', figures: true, cell: ({ bytes }) => sizeWords(bytes) },
  { key: 'sum', title: 'SHA-256, first 16', figures: true, cell: ({ sha256 }) => sha256.slice(0, 16) },
];

/** A release with its files. */
export function ReleaseCard({ release }: { release: Release }) {
  const { number, publishedOn, note, changes, codeVersion, citation, files } = release;
  return (
    <Stack gap="m">
      <Heading>{`Release ${number}, ${publishedOn}`}</Heading>
      <Text>{note}</Text>
      <Quiet>{`${evidenceWords(release)}. Banks since the release before: ${changeWords(changes)}. Fitted by version ${codeVersion}.`}</Quiet>
      <Table
        caption={`Files of release ${number}`}
        columns={columnsOf(number)}
        rows={files}
        rowKey={({ name }) => name}
      />
      <Quiet>{`To cite: ${citation}`}</Quiet>
    </Stack>
  );
}
