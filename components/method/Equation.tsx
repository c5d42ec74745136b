import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Figure, Quiet } from '@/components/ui';

interface EquationProps {
  number: number;
  /** The equation in plain signs; long ones break between their parts. */
  parts: readonly string[];
  /** Read out in words. */
  spoken: string;
}

/** An equation on a line of its own, with its number. */
export function Equation({ number, parts, spoken }: EquationProps) {
  return (
    <View role="group" aria-label={`Equation ${number}: ${spoken}`} style={styles.line}>
      <View aria-hidden style={styles.parts}>
        {parts.map((part) => (
          <Figure key={part} size="lead">
            {part}
          </Figure>
        ))}
      </View>
      <Quiet aria-hidden>{`(${number})`}</Quiet>
    </View>
  );
}

const styles = StyleSheet.create({
  line: {
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'space-between',
    gap: space.m,
    paddingVertical: space.m,
    paddingHorizontal: space.l,
    borderLeftWidth: 3,
    borderLeftColor: color.tide,
    backgroundColor: color.surface,
  },
  parts: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.s, flexShrink: 1, minWidth: 0 },
});
