import { StyleSheet, View } from 'react-native';
import { color } from '../theme';

export interface Share {
  label: string;
  /** 0..1 of the whole. */
  fraction: number;
}

const opacities = [1, 0.64, 0.42, 0.28, 0.2];

/** What a whole is made of, largest first, as one bar; the words that name the parts stand below it. */
export function ShareBar({ parts, summary }: { parts: readonly Share[]; summary: string }) {
  return (
    <View role="img" aria-label={summary} style={styles.bar}>
      {parts.map(({ label, fraction }, index) => (
        <View key={label} style={[styles.part, { flexGrow: fraction, opacity: opacities[index] ?? 0.15 }]} />
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  bar: { flexDirection: 'row', gap: 2, height: 16 },
  part: { flexBasis: 0, flexShrink: 1, minWidth: 2, backgroundColor: color.tide },
});
