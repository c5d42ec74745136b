import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Banner, Button, Dialog, Figure, Link, Quiet, Row, Stack, Text, useToast } from '@/components/ui';
import { useIssueRecord } from '@/lib/client/records';

import { digestWords, recordAddress } from './recordWords';

/** Says what a record shows before it is issued, and hands its link over after. */
export function IssueRecordDialog({ bankId, onClose }: { bankId: string; onClose: () => void }) {
  const { mutate, isPending, error, data } = useIssueRecord(bankId);
  if (data) return <IssuedDialog token={data.token} digest={data.record.digest} onClose={onClose} />;
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Issue a health record?"
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <Button kind="primary" label="Issue it" busy={isPending} onPress={() => mutate()} />
        </>
      }
    >
      <Stack gap="m">
        <Text>
          It shows the cell type, the layout, the year of first use, how the bank was used, each approved
          check with its month, its share of rated capacity and its uncertainty, the standing among banks used
          alike and the forecast, as they are now. It stays so whatever comes later.
        </Text>
        <Text>
          It names neither you nor a place, nor what you call the bank, nor the letters moderators know it by.
          Figures are rounded more coarsely than those of published rows. Still, who holds it and knows how
          you use the bank may find rows in a release that fit.
        </Text>
        <Text>
          Anyone with its link can read it until you withdraw it. Search engines are told to keep off.
        </Text>
        {error && (
          <Banner kind="error" title="It was not issued">
            {error.message}
          </Banner>
        )}
      </Stack>
    </Dialog>
  );
}

interface IssuedDialogProps {
  token: string;
  digest: string;
  onClose: () => void;
}

function IssuedDialog({ token, digest, onClose }: IssuedDialogProps) {
  const toast = useToast();
  const address = recordAddress(token);
  const copy = () =>
    void navigator.clipboard.writeText(address).then(
      () => toast({ text: 'The link is copied.' }),
      () => toast({ text: 'It could not be copied. Select the link and copy it by hand.' }),
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="The health record is issued"
      actions={<Button label="Done" onPress={onClose} />}
    >
      <Stack gap="m">
        <Text>
          Keep this link now: it is shown only this once, because only a fingerprint of it is stored. If it is
          lost, withdraw this record and issue another.
        </Text>
        <View style={styles.link}>
          <Figure selectable style={styles.address}>
            {address}
          </Figure>
        </View>
        <Row>
          <Button label="Copy the link" onPress={copy} />
          <Link href={{ pathname: '/records/[token]', params: { token } }}>Open it, to print</Link>
        </Row>
        <Quiet>{`Digest ${digestWords(digest)}, printed on it too.`}</Quiet>
      </Stack>
    </Dialog>
  );
}

const styles = StyleSheet.create({
  link: { padding: space.m, backgroundColor: color.wash },
  address: { wordBreak: 'break-all' } as object,
});
