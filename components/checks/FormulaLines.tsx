import { View } from 'react-native';

import { Figure } from '@/components/ui';

/** A formula and its numbers, line by line. */
export function FormulaLines({ lines }: { lines: readonly string[] }) {
  return (
    <View>
      {lines.map((line) => (
        <Figure key={line}>{line}</Figure>
      ))}
    </View>
  );
}
