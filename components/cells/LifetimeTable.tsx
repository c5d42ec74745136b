import { StyleSheet, View } from 'react-native';

import { type Column, type GaugeScale, Quiet, ScaleHead, type Sort, Stack, Table } from '@/components/ui';
import type { CellEntry, Use } from '@/lib/contract/cells';
import { formatCount } from '@/lib/units';

import {
  cyclesWords,
  EntryGauge,
  EntryLabel,
  EntryName,
  EntryYears,
  leftWords,
  priceWords,
  readToWords,
} from './LifetimeParts';
import { isDescending, type ListView, type SortKey, sortKeys } from './listView';

interface LifetimeTableProps {
  cells: readonly CellEntry[];
  use: Use;
  scale: GaugeScale;
  ticks: readonly number[];
  view: ListView;
  onViewChange: (view: ListView) => void;
}

/** The list on a wide window: a table whose gauges share the scale in their column's head. */
export function LifetimeTable({ cells, use, scale, ticks, view, onViewChange }: LifetimeTableProps) {
  const columns: Column<CellEntry>[] = [
    {
      ...{ key: 'name', title: 'Cell type', sortValue: kept },
      cell: (entry) => (
        <Stack gap="hair">
          <EntryName entry={entry} use={use} />
          <Quiet>{entry.cellType.maker}</Quiet>
        </Stack>
      ),
    },
    {
      ...{ key: 'left', title: 'Left at reach', figures: true, sortValue: kept, cell: leftWords },
    },
    {
      ...{ key: 'gauge', title: 'Years to 80 %, one scale for all', width: '27%' },
      under: <ScaleHead scale={scale} ticks={ticks} />,
      cell: (entry) => <EntryGauge entry={entry} scale={scale} />,
    },
    {
      ...{ key: 'life', title: 'Life', figures: true, sortValue: kept },
      cell: (entry) => (
        <Stack gap="hair" style={styles.right}>
          <EntryYears entry={entry} />
          <Quiet align="right">{cyclesWords(entry)}</Quiet>
        </Stack>
      ),
    },
    {
      ...{ key: 'label', title: 'Label implies', figures: true, sortValue: kept },
      cell: (entry) => (
        <View style={styles.right}>
          <EntryLabel entry={entry} />
        </View>
      ),
    },
    {
      ...{ key: 'banks', title: 'Banks', figures: true, sortValue: kept },
      cell: ({ evidence }) => (evidence ? formatCount(evidence.banks) : <Quiet>too few owners</Quiet>),
    },
    { ...{ key: 'reach', title: 'Read to', figures: true, sortValue: kept, cell: readToWords } },
    {
      ...{ key: 'price', title: 'Price per kWh', figures: true, sortValue: kept },
      cell: (entry) => {
        const words = priceWords(entry);
        return /\d/.test(words) ? words : <Quiet>{words}</Quiet>;
      },
    },
  ];
  const sort: Sort = { key: view.sort, descending: isDescending(view) };
  return (
    <Table
      caption="Cell types by measured life"
      columns={columns}
      rows={cells}
      rowKey={({ cellType }) => cellType.id}
      sort={sort}
      onSortChange={({ key }) => {
        if (!isSortKey(key)) return;
        const isTurn = key === view.sort && view.turned === undefined;
        onViewChange({ ...view, sort: key, turned: isTurn ? 'yes' : undefined });
      }}
      isInOrder
    />
  );
}

const styles = StyleSheet.create({ right: { alignItems: 'flex-end' } });

/** The list comes in its order: a column says only that it can be in order of it. */
const kept = () => 0;

const isSortKey = (key: string): key is SortKey => (sortKeys as readonly string[]).includes(key);
