import type { ReactNode } from 'react';
import { View } from 'react-native';

import { Button, Disclosure, Figure, Quiet, Row, Stack } from '@/components/ui';

export interface EstimateProps {
  /** What opens it: "Estimate it from a night's energy". */
  label: string;
  /** What is asked, as fields of its own. */
  children: ReactNode;
  /** The formula, first in words, then with the numbers once they are there. */
  lines: readonly string[];
  /** How good it is, and where its numbers come from. */
  caveat: string;
  /** As the button names it, "53 %"; undefined while there is none. */
  result: string | undefined;
  /** Why there is none, where that is not plain from empty fields. */
  problem?: string;
  onUse: () => void;
}

/**
 * A helper beside a field, for whoever does not know its value: a few fields, the formula, and a button that writes the
 * estimate into the field. Fields in it are no part of the form around it.
 */
export function Estimate({ label, children, lines, caveat, result, problem, onUse }: EstimateProps) {
  return (
    <View dataSet={{ aside: 'estimate' }}>
      <Disclosure label={label}>
        <Stack gap="m">
          {children}
          <View role="status">
            {lines.map((line) => (
              <Figure key={line} size="small">
                {line}
              </Figure>
            ))}
            {problem !== undefined && <Quiet tone="rust">{problem}</Quiet>}
          </View>
          <Quiet>{caveat}</Quiet>
          <Row>
            <Button
              label={result === undefined ? 'Use the estimate' : `Use ${result}`}
              disabled={result === undefined}
              onPress={onUse}
            />
          </Row>
        </Stack>
      </Disclosure>
    </View>
  );
}
