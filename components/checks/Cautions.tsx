import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Disclosure, Heading, Quiet, Stack, Text } from '@/components/ui';

import { cautions, conventionSentence } from './cautions';

/** The cautions whole. */
export function Cautions() {
  return (
    <Stack gap="l">
      {cautions.map(({ title, points }) => (
        <Stack key={title} gap="s">
          <Heading size="lead">{title}</Heading>
          <View role="list">
            {points.map((point) => (
              <View key={point} role="listitem" style={styles.point}>
                <View aria-hidden style={styles.mark} />
                <Text style={styles.words}>{point}</Text>
              </View>
            ))}
          </View>
        </Stack>
      ))}
      <Quiet>{conventionSentence}</Quiet>
    </Stack>
  );
}

/** The cautions folded, for steps that are filled in while the bank is worked on. */
export function CautionsFolded() {
  return (
    <Disclosure label="The cautions again">
      <Cautions />
    </Disclosure>
  );
}

const styles = StyleSheet.create({
  point: { flexDirection: 'row', gap: space.m, paddingVertical: space.xs },
  mark: { width: 8, height: 2, marginTop: 10, backgroundColor: color.brass, flexShrink: 0 },
  words: { flex: 1, minWidth: 0 },
});
