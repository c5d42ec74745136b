import type { ReactNode } from 'react';
import { StyleSheet, View, type DimensionValue } from 'react-native';
import { color, radius, space } from '../theme';
import { VisuallyHidden } from './VisuallyHidden';

/** A grey bar in the place of something that is still coming, in its size. */
export function Skeleton({ width = '100%', height = 16 }: { width?: DimensionValue; height?: number }) {
  return <View aria-hidden dataSet={{ look: 'breathe' }} style={[styles.bar, { width, height }]} />;
}

/** Wraps the skeletons of a page or part, and says to screen readers that it is loading. */
export function LoadingState({ label = 'Loading', children }: { label?: string; children: ReactNode }) {
  return (
    <View aria-busy role="status" style={styles.group}>
      <VisuallyHidden>{label}</VisuallyHidden>
      {children}
    </View>
  );
}

/** Rows as a list or table will have them. */
export function SkeletonRows({ count = 5, height = 56 }: { count?: number; height?: number }) {
  return (
    <View>
      {Array.from({ length: count }, (_, index) => (
        <View key={index} style={[styles.row, { height }]}>
          <Skeleton width={`${44 - (index % 3) * 8}%`} />
          <Skeleton width={64} />
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  bar: { backgroundColor: color.line, borderRadius: radius.small, maxWidth: '100%' },
  group: { gap: space.m },
  row: {
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'space-between',
    borderBottomWidth: 1,
    borderBottomColor: color.line,
    gap: space.l,
  },
});
