import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Disclosure, Heading, Quiet, SeverityChip, Strong } from '@/components/ui';
import type { Finding } from '@/lib/contract/moderation';
import { formatCount } from '@/lib/units';

/** What screening found, doubtful first, each with its numbers in words; what fits stands folded up below. */
export function FindingList({ findings }: { findings: Finding[] }) {
  const remarks = findings.filter(({ severity }) => severity !== 'fits');
  const fine = findings.filter(({ severity }) => severity === 'fits');
  return (
    <View style={styles.list}>
      <Heading>Findings</Heading>
      {remarks.map((finding) => (
        <FindingItem key={finding.rule} finding={finding} />
      ))}
      {fine.length > 0 && (
        <Disclosure
          label={`Looked at and fine (${formatCount(fine.length)})`}
          startsOpen={remarks.length === 0}
        >
          {fine.map((finding) => (
            <FindingItem key={finding.rule} finding={finding} />
          ))}
        </Disclosure>
      )}
    </View>
  );
}

function FindingItem({ finding: { title, severity, text } }: { finding: Finding }) {
  return (
    <View style={styles.finding}>
      <View style={styles.line}>
        <Strong style={styles.title}>{title}</Strong>
        <SeverityChip severity={severity} />
      </View>
      <Quiet>{text}</Quiet>
    </View>
  );
}

const styles = StyleSheet.create({
  list: { gap: space.xs },
  finding: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'flex-start', gap: space.s },
  title: { flexShrink: 1, minWidth: 0 },
});
