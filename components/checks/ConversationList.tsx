import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Quiet, Strong, Text } from '@/components/ui';
import type { Message } from '@/lib/contract/checks';
import { formatInstant } from '@/lib/units';

const byWords: Record<Message['by'], string> = { owner: 'Owner', moderator: 'Moderator', system: 'Ebbline' };

const actionWords: Record<string, string> = {
  submitted: 'submitted',
  edited: 'corrected the figures',
  resubmitted: 'corrected and sent again',
  sentBack: 'asked',
  answered: 'answered',
  approved: 'approved',
  turnedAway: 'turned away',
  withdrawn: 'withdrew',
  recalled: 'recalled',
  corrected: 'approved with a correction',
  objected: 'did not agree with the correction',
  realFailure: 'kept it as a real failure',
  merged: 'merged it into another check',
  duplicateMerged: 'took another check of the same test for this one',
  decisionUndone: 'took the decision back',
  turnAwayProposed: 'proposed to turn it away',
  recallProposed: 'proposed to recall it',
  lookedAtBlind: 'looked at it without knowing the decision',
  recomputed: 'worked the figures out anew',
};

interface ConversationListProps {
  messages: Message[];
  /** Whether the reader is the owner, who is then spoken to. */
  isOwn?: boolean;
}

/** Every step of a check in order, with the words that went with it. */
export function ConversationList({ messages, isOwn = false }: ConversationListProps) {
  const speaker = (by: Message['by']) => (isOwn && by === 'owner' ? 'You' : byWords[by]);
  return (
    <View role="list" aria-label="Conversation">
      {messages.map(({ at, by, action, text }, index) => (
        <View key={index} role="listitem" style={styles.message}>
          <View style={styles.line}>
            <Strong>{`${speaker(by)} ${actionWords[action] ?? action}`}</Strong>
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
