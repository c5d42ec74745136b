import { StyleSheet, View } from 'react-native';

import { color, space } from '../theme';
import { Text } from './Text';

/** Sentences below each other, each with its mark. */
export function Points({ points }: { points: readonly string[] }) {
  return (
    <View role="list">
      {points.map((point) => (
        <View key={point} role="listitem" style={styles.point}>
          <View aria-hidden style={styles.mark} />
          <Text style={styles.words}>{point}</Text>
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  point: { flexDirection: 'row', gap: space.m, paddingVertical: space.xs },
  mark: { width: 8, height: 2, marginTop: 10, backgroundColor: color.brass, flexShrink: 0 },
  words: { flex: 1, minWidth: 0 },
});
