import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Quiet, Strong, Text } from '@/components/ui';
import type { Message } from '@/lib/contract/checks';
import { formatInstant } from '@/lib/units';

const byWords: Record<Message['by'], string> = { owner: 'Owner', moderator: 'Moderator', system: 'Ebbline' };

const actionWords: Record<string, string> = {
  submitted: 'submitted',
  resubmitted: 'corrected and sent again',
  sentBack: 'asked',
  answered: 'answered',
  approved: 'approved',
  turnedAway: 'turned away',
  withdrawn: 'withdrew',
  recalled: 'recalled',
};

/** Every step of a check in order, with the words that went with it. */
export function ConversationList({ messages }: { messages: Message[] }) {
  return (
    <View role="list" aria-label="Conversation">
      {messages.map(({ at, by, action, text }, index) => (
        <View key={index} role="listitem" style={styles.message}>
          <View style={styles.line}>
            <Strong>{`${byWords[by]} ${actionWords[action] ?? action}`}</Strong>
            <Quiet>{formatInstant(at)}</Quiet>
          </View>
          {text !== '' && <Text>{text}</Text>}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  message: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'space-between', columnGap: space.m },
});
