import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Heading, Quiet, SeverityChip, Strong } from '@/components/ui';
import type { Check } from '@/lib/contract/checks';

/** What screening noticed, in words for the owner; what asks for a look comes first, what fits is counted. */
export function OwnFindings({ findings }: Pick<Check, 'findings'>) {
  const odd = findings.filter(({ severity }) => severity !== 'fits');
  const fitting = findings.filter(({ severity }) => severity === 'fits');
  return (
    <View style={styles.list}>
      <Heading>What was looked at</Heading>
      {findings.length === 0 && <Quiet>Nothing was looked at yet.</Quiet>}
      {odd.map(({ rule, title, severity, text }) => (
        <View key={rule} style={styles.finding}>
          <View style={styles.line}>
            <Strong style={styles.title}>{title}</Strong>
            <SeverityChip severity={severity} />
          </View>
          <Quiet>{text}</Quiet>
        </View>
      ))}
      {fitting.length > 0 && (
        <View style={styles.finding}>
          <View style={styles.line}>
            <Strong style={styles.title}>{odd.length > 0 ? 'The rest' : 'Everything'}</Strong>
            <SeverityChip severity="fits" />
          </View>
          <Quiet>{`${fitting.map(({ title }) => title).join(', ')}.`}</Quiet>
        </View>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { gap: space.xs },
  finding: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'flex-start', gap: space.s },
  title: { flexShrink: 1, minWidth: 0 },
});
