import { lifeAtUse } from '@/components/chosenUse/atUse';
import { type Column, Heading, Link, Quiet, Stack, Table, Text } from '@/components/ui';
import type { CellPage } from '@/lib/contract/cells';
import { chosenUseSearch } from '@/lib/contract/chosenUse';
import { formatQuantity } from '@/lib/units';
import { useMemo } from 'react';

import { lifeInShort } from './lifeWords';

type Related = CellPage['related'][number];

/** Cell types of the same form and nearest in capacity, at the same use. */
export function RelatedCells({ page: { related, model, use } }: { page: CellPage }) {
  const told = useMemo(
    () =>
      related.map((cellType) => ({
        cellType,
        life: model?.cellTypes.some(({ id }) => id === cellType.id)
          ? lifeAtUse(model, cellType.id, use)
          : null,
      })),
    [related, model, use],
  );
  if (related.length === 0) return null;
  const columns: Column<(typeof told)[number]>[] = [
    {
      key: 'name',
      title: 'Cell type',
      cell: ({ cellType }) => <Name cellType={cellType} search={chosenUseSearch(use)} />,
    },
    {
      key: 'life',
      title: 'Life at this use',
      cell: ({ life }) =>
        life ? <Text>{lifeInShort(life)}</Text> : <Quiet>too few owners or banks yet</Quiet>,
    },
  ];
  return (
    <Stack gap="s">
      <Heading level={2}>Cell types like it</Heading>
      <Table
        caption="Cell types of the same form and near in capacity"
        columns={columns}
        rows={told}
        rowKey={({ cellType }) => cellType.id}
      />
    </Stack>
  );
}

function Name({ cellType: { id, name, ratedAh }, search }: { cellType: Related; search: string }) {
  return (
    <Text>
      <Link href={`/cells/${id}${search}`}>{name}</Link>
      <Quiet>{`  ${formatQuantity(ratedAh, 'Ah', { decimals: 0 })}`}</Quiet>
    </Text>
  );
}
