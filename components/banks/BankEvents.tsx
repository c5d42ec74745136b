import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Button, Heading, Quiet, Stack, Strong, Text } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import { formatDate } from '@/lib/units';

import { AddEventDialog } from './AddEventDialog';
import { bankEventWords } from './bankWords';

/** What happened to a bank, the newest first, with the way to add to it. */
export function BankEvents({ bank, onEnded }: { bank: Bank; onEnded: () => void }) {
  const [isAdding, setIsAdding] = useState(false);
  return (
    <Stack gap="s">
      <Heading>Events</Heading>
      {bank.events.length === 0 ? (
        <Quiet>
          Nothing yet. Note what changes the curve: a rebalance, a replaced or failed cell, another meter, an
          end. Failures count as much as long lives.
        </Quiet>
      ) : (
        <View role="list" aria-label="Events">
          {[...bank.events].reverse().map(({ id, happenedOn, kind, note }) => (
            <View key={id} role="listitem" style={styles.event}>
              <View style={styles.line}>
                <Strong>{bankEventWords[kind]}</Strong>
                <Quiet>{formatDate(happenedOn)}</Quiet>
              </View>
              {note !== '' && <Text>{note}</Text>}
            </View>
          ))}
        </View>
      )}
      <Button label="Add an event" onPress={() => setIsAdding(true)} />
      {isAdding && <AddEventDialog bank={bank} onClose={() => setIsAdding(false)} onEnded={onEnded} />}
    </Stack>
  );
}

const styles = StyleSheet.create({
  event: { paddingVertical: space.s, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.hair },
  line: { flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'space-between', columnGap: space.m },
});
