import type { ReactNode } from 'react';
import { StyleSheet, Text } from 'react-native';

/** Words for screen readers only; `live` announces them when they change. */
export function VisuallyHidden({ children, live, id }: { children: ReactNode; live?: boolean; id?: string }) {
  return (
    <Text nativeID={id} style={styles.hidden} aria-live={live ? 'polite' : undefined}>
      {children}
    </Text>
  );
}

const styles = StyleSheet.create({
  hidden: { position: 'absolute', width: 1, height: 1, margin: -1, overflow: 'hidden', opacity: 0 },
});
