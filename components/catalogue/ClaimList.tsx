import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Banner, Button, Chip, Dialog, Heading, Quiet, Row, Stack, Text, useToast } from '@/components/ui';
import { useRemoveClaim } from '@/lib/client/catalogue';
import type { CatalogueClaim, CataloguePage } from '@/lib/contract/catalogue';

import { ClaimDialog } from './ClaimDialog';
import { claimTitle, conditionWords, statedWords } from './catalogueWords';

/** What data sheets claim, each with its conditions and where it stands. */
export function ClaimList({ entry, canEdit }: { entry: CataloguePage; canEdit: boolean }) {
  const [editing, setEditing] = useState<CatalogueClaim | 'new' | null>(null);
  const [removing, setRemoving] = useState<CatalogueClaim | null>(null);
  return (
    <Stack gap="s">
      <Row justify="space-between">
        <Heading level={2}>Quoted claims</Heading>
        {canEdit && <Button label="Add a claim" onPress={() => setEditing('new')} />}
      </Row>
      {entry.claims.length === 0 && <Quiet>No claim of a data sheet is on record.</Quiet>}
      <View role="list" aria-label="Quoted claims">
        {entry.claims.map((claim) => (
          <View key={claim.id} role="listitem" style={styles.claim}>
            <Row gap="s">
              <Text tone="brass" weight="strong">
                {claimTitle(claim)}
              </Text>
              {claim.notStated.length > 0 && <Chip tone="brass">conditions not stated</Chip>}
            </Row>
            <Text>{`Stated: ${statedWords(claim)}.`}</Text>
            {claim.notStated.length > 0 && (
              <Quiet>{`Not stated: ${claim.notStated.map((one) => conditionWords[one]).join(', ')}. It is compared with no measured life.`}</Quiet>
            )}
            <Quiet>{claim.whereItStands}</Quiet>
            {canEdit && (
              <Row gap="s">
                <Button label="Edit the claim" kind="quiet" onPress={() => setEditing(claim)} />
                <Button label="Take it out" kind="quiet" onPress={() => setRemoving(claim)} />
              </Row>
            )}
          </View>
        ))}
      </View>
      {editing && (
        <ClaimDialog
          entry={entry}
          claim={editing === 'new' ? null : editing}
          onClose={() => setEditing(null)}
        />
      )}
      {removing && <RemoveDialog entry={entry} claim={removing} onClose={() => setRemoving(null)} />}
    </Stack>
  );
}

interface RemoveDialogProps {
  entry: CataloguePage;
  claim: CatalogueClaim;
  onClose: () => void;
}

function RemoveDialog({ entry, claim, onClose }: RemoveDialogProps) {
  const remove = useRemoveClaim(entry.id);
  const toast = useToast();
  const send = () =>
    remove.mutate(
      { claimId: claim.id, version: entry.version },
      {
        onSuccess: () => {
          toast({ text: 'The claim is out. The trail keeps it.' });
          onClose();
        },
      },
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Take the claim out"
      actions={
        <>
          <Button label="Leave it in" onPress={onClose} />
          <Button label="Take it out" kind="danger" onPress={send} busy={remove.isPending} />
        </>
      }
    >
      <Stack gap="m">
        <Text>{`${claimTitle(claim)}: ${claim.whereItStands}`}</Text>
        <Quiet>It leaves the public page. What it said stays in the trail.</Quiet>
        {remove.isError && <Banner kind="error">{remove.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}

const styles = StyleSheet.create({
  claim: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
});
