import { Children, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { space } from '../theme';

/** Short fields side by side where the width allows it, below each other where not. */
export function FieldPair({ children }: { children: ReactNode }) {
  return (
    <View style={styles.row}>
      {Children.toArray(children).map((child, index) => (
        <View key={index} style={styles.half}>
          {child}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.l, rowGap: space.l },
  half: { flexGrow: 1, flexShrink: 1, flexBasis: 240, minWidth: 0 },
});
