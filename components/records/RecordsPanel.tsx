import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { QueryView } from '@/components/QueryView';
import { color, space } from '@/components/theme';
import { Button, Heading, LoadingState, Quiet, SkeletonRows, Stack, Text } from '@/components/ui';
import { recordsQuery } from '@/lib/client/records';
import type { HealthRecord } from '@/lib/contract/records';
import { calendarDateOf, formatDate } from '@/lib/units';

import { IssueRecordDialog } from './IssueRecordDialog';
import { digestWords } from './recordWords';
import { WithdrawRecordDialog } from './WithdrawRecordDialog';

/** The health records of a bank: what was issued, and the way to issue and to withdraw one. */
export function RecordsPanel({ bankId, hasApproved }: { bankId: string; hasApproved: boolean }) {
  const query = useQuery(recordsQuery(bankId));
  const [isIssuing, setIsIssuing] = useState(false);
  return (
    <Stack gap="s">
      <Heading>Health records</Heading>
      <Quiet>
        A page to print for a buyer, an insurer or an installer: the bank, its checks, its standing and a
        forecast, as they are on that day. It stands behind a link that you can withdraw.
      </Quiet>
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the health records">
            <SkeletonRows count={1} height={32} />
          </LoadingState>
        }
      >
        {(records) =>
          records.length > 0 ? (
            <View role="list" aria-label="Health records">
              {records.map((record) => (
                <RecordLine key={record.id} bankId={bankId} record={record} />
              ))}
            </View>
          ) : null
        }
      </QueryView>
      {hasApproved ? (
        <Button label="Issue a health record" onPress={() => setIsIssuing(true)} />
      ) : (
        <Quiet>One can be issued once a check is approved.</Quiet>
      )}
      {isIssuing && <IssueRecordDialog bankId={bankId} onClose={() => setIsIssuing(false)} />}
    </Stack>
  );
}

function RecordLine({ bankId, record }: { bankId: string; record: HealthRecord }) {
  const [isAsking, setIsAsking] = useState(false);
  const { issuedAt, withdrawnAt, digest } = record;
  const issued = formatDate(calendarDateOf(new Date(issuedAt), 'local'));
  return (
    <View role="listitem" style={styles.line}>
      <View style={styles.words}>
        <Text>{`Issued ${issued}`}</Text>
        <Quiet>
          {withdrawnAt
            ? `withdrawn ${formatDate(calendarDateOf(new Date(withdrawnAt), 'local'))}`
            : `in force, digest ${digestWords(digest)}`}
        </Quiet>
      </View>
      {!withdrawnAt && (
        <Button
          kind="quiet"
          label="Withdraw"
          description={`Withdraw the record of ${issued}, digest ${digestWords(digest)}`}
          onPress={() => setIsAsking(true)}
        />
      )}
      {isAsking && (
        <WithdrawRecordDialog {...{ bankId, record, issued }} onClose={() => setIsAsking(false)} />
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  line: {
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'space-between',
    gap: space.s,
    paddingVertical: space.xs,
    borderBottomWidth: 1,
    borderBottomColor: color.line,
  },
  words: { flexShrink: 1 },
});
