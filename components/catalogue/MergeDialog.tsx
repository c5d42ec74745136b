import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import {
  Banner,
  Button,
  Dialog,
  DefinitionList,
  LoadingState,
  Quiet,
  SelectField,
  SkeletonRows,
  Stack,
  useToast,
} from '@/components/ui';
import { catalogueQuery, mergePreviewQuery, useMergeCellTypes } from '@/lib/client/catalogue';
import type { CataloguePage, MergePreview } from '@/lib/contract/catalogue';
import { formatCount } from '@/lib/units';

import { dependentsWords, fullName, ratingWords } from './catalogueWords';

/** Makes two cell types one: which stays, what would move, and only then the merge. */
export function MergeDialog({ entry, onClose }: { entry: CataloguePage; onClose: () => void }) {
  const [intoId, setIntoId] = useState('');
  const all = useQuery(catalogueQuery);
  const preview = useQuery({ ...mergePreviewQuery(entry.id, intoId), enabled: intoId !== '' });
  const merge = useMergeCellTypes(entry.id);
  const router = useRouter();
  const toast = useToast();
  const others = (all.data ?? []).filter(({ id, status }) => status === 'listed' && id !== entry.id);
  const plan = intoId === '' ? undefined : preview.data;
  const send = () =>
    plan &&
    merge.mutate(
      { version: plan.from.version, intoId, intoVersion: plan.into.version },
      {
        onSuccess: () => {
          toast({ text: `${fullName(plan.from)} is one with ${fullName(plan.into)} now.` });
          onClose();
          router.replace(`/screening/cell-types/${intoId}`);
        },
      },
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Merge into another"
      actions={
        <>
          <Button label="Leave them apart" onPress={onClose} />
          <Button
            label="Merge the two"
            kind="danger"
            onPress={send}
            busy={merge.isPending}
            disabled={!plan}
          />
        </>
      }
    >
      <Stack gap="m">
        <SelectField
          label="The cell type that stays"
          hint={`${fullName(entry)}, ${ratingWords(entry)}, goes.`}
          value={intoId}
          options={others.map((one) => ({ value: one.id, label: `${fullName(one)}, ${ratingWords(one)}` }))}
          onChange={setIntoId}
        />
        {intoId !== '' && (
          <QueryView
            query={preview}
            loading={
              <LoadingState label="Counting what would move">
                <SkeletonRows count={3} height={32} />
              </LoadingState>
            }
          >
            {(found) => <Preview preview={found} />}
          </QueryView>
        )}
        {merge.isError && <Banner kind="error">{merge.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}

function Preview({ preview }: { preview: MergePreview }) {
  const { from, into, approvedChecks, claimsMoved, claimsDropped, isRecomputed } = preview;
  return (
    <Stack gap="m">
      <DefinitionList
        items={[
          { label: 'Banks and checks moved', value: dependentsWords(from) },
          { label: 'Of them approved', value: formatCount(approvedChecks) },
          { label: 'Claims moved', value: formatCount(claimsMoved) },
          { label: 'Claims that stand on both', value: formatCount(claimsDropped) },
          { label: 'On the one that stays', value: dependentsWords(into) },
        ]}
      />
      {isRecomputed && (
        <Banner kind="caution" title="The ratings differ">
          {`${ratingWords(from)} against ${ratingWords(into)}: the checks moved are worked out anew.`}
        </Banner>
      )}
      <Quiet>
        It can’t be undone in one step. The trail keeps every bank and claim that moved; the old address leads
        to the one that stays. The working fit follows at once, the public one with its next step.
      </Quiet>
    </Stack>
  );
}
