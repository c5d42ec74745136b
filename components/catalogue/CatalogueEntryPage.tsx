import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryPage } from '@/components/QueryPage';
import {
  Banner,
  Button,
  DefinitionList,
  Heading,
  Link,
  LoadingState,
  Page,
  PageHead,
  Row,
  SkeletonRows,
  Stack,
  Text,
  useToast,
} from '@/components/ui';
import { cataloguePageQuery, useListCellType } from '@/lib/client/catalogue';
import type { CataloguePage } from '@/lib/contract/catalogue';
import { formatQuantity } from '@/lib/units';

import { CatalogueTrail } from './CatalogueTrail';
import { ClaimList } from './ClaimList';
import { DeclineDialog } from './DeclineDialog';
import { EditCellTypeDialog } from './EditCellTypeDialog';
import { MergeDialog } from './MergeDialog';
import { StatusChip } from './StatusChip';
import { ahWords, dependentsWords, formatWords, fullName } from './catalogueWords';

const back = { href: '/screening/cell-types', label: 'Cell types' } as const;

/** One entry of the catalogue: what it says, its claims, and what happened to it. */
export function CatalogueEntryPage({ cellId }: { cellId: string }) {
  const query = useQuery(cataloguePageQuery(cellId));
  return (
    <QueryPage
      query={query}
      title="Cell type"
      back={back}
      loading={
        <LoadingState label="Loading the cell type">
          <SkeletonRows count={6} height={36} />
        </LoadingState>
      }
    >
      {(entry) => <Entry entry={entry} />}
    </QueryPage>
  );
}

type Asked = 'edit' | 'decline' | 'merge';

function Entry({ entry }: { entry: CataloguePage }) {
  const { id, status, version, mergedIntoId, faceAreaMm2, massKg, ratedAh, nominalV, format } = entry;
  const [asking, setAsking] = useState<Asked | null>(null);
  const list = useListCellType(id);
  const toast = useToast();
  const close = () => setAsking(null);
  const isOpen = status !== 'merged';
  const canList = status === 'proposed' || status === 'declined';
  return (
    <Page>
      <PageHead
        title={fullName(entry)}
        back={back}
        sub={
          <Row gap="s">
            <StatusChip status={status} />
            <Text tone="quiet">{dependentsWords(entry)}</Text>
            {status === 'listed' && <Link href={`/cells/${id}`}>Its public page</Link>}
          </Row>
        }
        actions={
          isOpen && (
            <Row gap="s">
              <Button label="Edit" onPress={() => setAsking('edit')} />
              <Button label="Merge into another" onPress={() => setAsking('merge')} />
              {status === 'proposed' && (
                <Button label="Decline" kind="danger" onPress={() => setAsking('decline')} />
              )}
              {canList && (
                <Button
                  label="List it"
                  kind="primary"
                  busy={list.isPending}
                  onPress={() =>
                    list.mutate(version, {
                      onSuccess: () => toast({ text: 'It is listed. Its proposer is told.' }),
                    })
                  }
                />
              )}
            </Row>
          )
        }
      />
      {list.isError && <Banner kind="error">{list.error.message}</Banner>}
      {mergedIntoId && (
        <Banner kind="info" title="It is one with another cell type">
          <Text>
            Its banks and claims were moved to{' '}
            <Link href={`/screening/cell-types/${mergedIntoId}`}>{mergedIntoId}</Link>, where its own address
            leads too.
          </Text>
        </Banner>
      )}
      <DefinitionList
        items={[
          { label: 'Key in addresses', value: id },
          { label: 'Rated capacity', value: ahWords(ratedAh) },
          { label: 'Nominal voltage', value: formatQuantity(nominalV, 'V', { decimals: 2 }) },
          { label: 'Format', value: formatWords[format] },
          {
            label: 'Face area',
            value: faceAreaMm2 === null ? 'not known' : formatQuantity(faceAreaMm2, 'mm²', { decimals: 0 }),
          },
          {
            label: 'Mass',
            value: massKg === null ? 'not known' : formatQuantity(massKg, 'kg', { decimals: 2 }),
          },
        ]}
      />
      <ClaimList entry={entry} canEdit={isOpen} />
      <Stack gap="s">
        <Heading level={2}>Trail</Heading>
        <CatalogueTrail lines={entry.trail} />
      </Stack>
      {asking === 'edit' && <EditCellTypeDialog entry={entry} onClose={close} />}
      {asking === 'decline' && <DeclineDialog entry={entry} onClose={close} />}
      {asking === 'merge' && <MergeDialog entry={entry} onClose={close} />}
    </Page>
  );
}
