import { useQueries, useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { ButtonLink, EmptyState, LoadingState, Page, PageHead, SkeletonRows, Text } from '@/components/ui';
import { banksQuery } from '@/lib/client/banks';
import { bankChecksQuery } from '@/lib/client/checks';
import type { Bank } from '@/lib/contract/banks';

import { BankList } from './BankList';

const add = <ButtonLink kind="primary" href="/banks/new" label="Add a bank" />;
const actions = (
  <>
    <ButtonLink href="/banks/import" label="Add earlier checks" />
    {add}
  </>
);

/** One's own banks, those that wait for an answer first. */
export function BankListPage() {
  const query = useQuery(banksQuery);
  const hasBanks = query.data !== undefined && query.data.length > 0;
  return (
    <Page>
      <PageHead
        title="My banks"
        sub="Each with its yearly checks, and what was made of them."
        actions={hasBanks ? actions : undefined}
      />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading your banks">
            <SkeletonRows count={3} height={104} />
          </LoadingState>
        }
      >
        {(banks) => (banks.length > 0 ? <LoadedList banks={banks} /> : <NoBanks />)}
      </QueryView>
    </Page>
  );
}

function LoadedList({ banks }: { banks: Bank[] }) {
  const checks = useQueries({ queries: banks.map(({ id }) => bankChecksQuery(id)) });
  return <BankList banks={banks.map((bank, index) => ({ bank, checks: checks[index]?.data }))} />;
}

function NoBanks() {
  return (
    <EmptyState title="No bank yet" action={add}>
      <Text tone="quiet">
        A bank is one installation of cells of one type, with one history. Add yours: cell type, layout, first
        use and how the cells are held are enough to begin. After that you add a capacity check about once a
        year.
      </Text>
    </EmptyState>
  );
}
