import { Children, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { space } from '../theme';

/** Short fields side by side where the width allows it, below each other where not; `isNarrow` ones even on a phone. */
export function FieldPair({ children, isNarrow = false }: { children: ReactNode; isNarrow?: boolean }) {
  return (
    <View style={styles.row}>
      {Children.toArray(children).map((child, index) => (
        <View key={index} style={[styles.half, isNarrow && styles.narrow]}>
          {child}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.l, rowGap: space.l },
  half: { flexGrow: 1, flexShrink: 1, flexBasis: 240, minWidth: 0 },
  narrow: { flexBasis: 140 },
});
