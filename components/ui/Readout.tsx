import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { space, type Color } from '../theme';
import { Figure, Quiet, Text } from './Text';

export interface ReadoutProps {
  /** The figure as text, without its unit; a dash where there is none. */
  value: string;
  unit: string;
  /** What the figure says: "left at 7.4 years, measured". */
  children: ReactNode;
  /** Ink for measured, tide for projected, brass for quoted. */
  tone?: Extract<Color, 'ink' | 'tide' | 'brass' | 'quiet'>;
}

/** One of the large figures at the head of a page, with its unit and its words. */
export function Readout({ value, unit, children, tone = 'ink' }: ReadoutProps) {
  return (
    <View style={styles.box}>
      <Text style={styles.line}>
        <Figure size="readout" tone={tone} strong style={styles.tight}>
          {value}
        </Figure>
        <Text size="heading" tone={tone} weight="strong">
          {` ${unit}`}
        </Text>
      </Text>
      <Quiet>{children}</Quiet>
    </View>
  );
}

/** Readouts side by side, all equally wide. */
export function Readouts({ children }: { children: ReactNode }) {
  return <View style={styles.row}>{children}</View>;
}

const styles = StyleSheet.create({
  box: { flexGrow: 1, flexShrink: 1, flexBasis: 96, gap: space.xs },
  line: { marginLeft: -1 },
  tight: { letterSpacing: -2 },
  row: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.l, rowGap: space.l },
});
