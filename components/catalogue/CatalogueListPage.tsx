import { useQuery } from '@tanstack/react-query';
import { useLocalSearchParams, useRouter } from 'expo-router';

import { QueryView } from '@/components/QueryView';
import {
  type Column,
  Chip,
  EmptyState,
  Link,
  LoadingState,
  Page,
  PageHead,
  Row,
  SelectField,
  SkeletonRows,
  Table,
  TextField,
} from '@/components/ui';
import { catalogueQuery } from '@/lib/client/catalogue';
import { type CatalogueEntry, cellTypeStatusSchema } from '@/lib/contract/catalogue';
import { formatCount } from '@/lib/units';

import { ScreeningTabs } from '../moderation/ScreeningTabs';
import { type CatalogueFilters, filterCatalogue } from './filterCatalogue';
import { StatusChip } from './StatusChip';
import { ahWords, fullName, statusWords } from './catalogueWords';

const stateCell = ({ status }: CatalogueEntry) => (
  <Row>
    <StatusChip status={status} />
  </Row>
);

/** What is listed or proposed, as a choice among the states. */
const inCatalogue = 'inCatalogue';

const columns: Column<CatalogueEntry>[] = [
  {
    key: 'name',
    title: 'Cell type',
    cell: (entry) => <Link href={`/screening/cell-types/${entry.id}`}>{fullName(entry)}</Link>,
    sortValue: fullName,
  },
  { key: 'status', title: 'State', cell: stateCell },
  {
    key: 'rated',
    title: 'Rated',
    figures: true,
    cell: ({ ratedAh }) => ahWords(ratedAh),
    sortValue: ({ ratedAh }) => ratedAh,
  },
  countColumn('banks', 'Banks'),
  countColumn('checks', 'Checks'),
  countColumn('claims', 'Claims'),
];

function countColumn(key: 'banks' | 'checks' | 'claims', title: string): Column<CatalogueEntry> {
  return {
    ...{ key, title, figures: true },
    cell: (entry) => formatCount(entry[key]),
    sortValue: (entry) => entry[key],
  };
}

/** Every cell type, proposals first, with what depends on each. */
export function CatalogueListPage() {
  const query = useQuery(catalogueQuery);
  return (
    <Page>
      <PageHead title="Cell types" sub="What owners choose from, and what data sheets claim of it." />
      <ScreeningTabs />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the cell types">
            <SkeletonRows count={10} height={40} />
          </LoadingState>
        }
      >
        {(entries) => <CatalogueTable entries={entries} />}
      </QueryView>
    </Page>
  );
}

function CatalogueTable({ entries }: { entries: CatalogueEntry[] }) {
  const filters = useFilters();
  const router = useRouter();
  const set = (changes: Partial<Record<'search' | 'status', string>>) =>
    router.setParams({ search: filters.search || undefined, status: filters.status, ...changes });
  const shown = filterCatalogue(entries, filters);
  const proposed = entries.filter(({ status }) => status === 'proposed').length;
  return (
    <>
      {proposed > 0 && (
        <Row gap="s">
          <Chip tone="brass">{`${formatCount(proposed)} proposed`}</Chip>
        </Row>
      )}
      <TextField
        label="Maker or name"
        optional
        inputMode="search"
        value={filters.search}
        onChange={(search) => set({ search: search || undefined })}
      />
      <SelectField
        label="State"
        value={filters.status ?? inCatalogue}
        options={[
          {
            value: inCatalogue,
            label: `In the catalogue (${formatCount(filterCatalogue(entries, { search: '' }).length)})`,
          },
          ...cellTypeStatusSchema.options.map((status) => ({
            value: status,
            label: `${statusWords[status]} (${formatCount(entries.filter((one) => one.status === status).length)})`,
          })),
        ]}
        onChange={(status) => set({ status: status === inCatalogue ? undefined : status })}
      />
      {shown.length === 0 ? (
        <EmptyState title="No such cell type">Change the words or the state above.</EmptyState>
      ) : (
        <Table caption="Cell types" columns={columns} rows={shown} rowKey={({ id }) => id} />
      )}
    </>
  );
}

function useFilters(): CatalogueFilters {
  const { search, status } = useLocalSearchParams<{ search?: string; status?: string }>();
  return { search: search ?? '', status: cellTypeStatusSchema.safeParse(status).data };
}
