import { StyleSheet, View } from 'react-native';
import { color, space } from '../theme';
import { Quiet, Text } from './Text';

export interface ProgressProps {
  /** What is under way: "Sending shed.csv". */
  label: string;
  /** 0..1; left out while how much is left is unknown. */
  fraction?: number;
  /** What is known beside it: "412,000 rows read". */
  detail?: string;
}

export function Progress({ label, fraction, detail }: ProgressProps) {
  const percent = fraction === undefined ? undefined : Math.round(Math.min(1, Math.max(0, fraction)) * 100);
  return (
    <View style={styles.box}>
      <View style={styles.words}>
        <Text>{label}</Text>
        {percent !== undefined && <Quiet>{`${percent} %`}</Quiet>}
      </View>
      <View
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
        style={styles.track}
      >
        <View
          dataSet={percent === undefined ? { look: 'breathe' } : undefined}
          style={[styles.fill, { width: `${percent ?? 100}%` }]}
        />
      </View>
      {detail && <Quiet aria-live="polite">{detail}</Quiet>}
    </View>
  );
}

export interface StepsProps {
  /** Names of the steps, in order. */
  steps: readonly string[];
  /** The one being done, from 0. */
  current: number;
}

/** How far a form of several pages is: one bar per step, and words for screen readers. */
export function Steps({ steps, current }: StepsProps) {
  const name = steps[current] ?? '';
  return (
    <View
      role="progressbar"
      aria-label="Steps"
      aria-valuemin={1}
      aria-valuemax={steps.length}
      aria-valuenow={current + 1}
      aria-valuetext={`Step ${current + 1} of ${steps.length}: ${name}`}
      style={styles.steps}
    >
      {steps.map((step, index) => (
        <View key={step} style={[styles.step, index <= current && styles.stepDone]} />
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  box: { gap: 6 },
  words: { flexDirection: 'row', justifyContent: 'space-between', gap: space.m },
  track: { height: 8, backgroundColor: color.line, overflow: 'hidden' },
  fill: { height: 8, backgroundColor: color.tide },
  steps: { flexDirection: 'row', gap: space.xs },
  step: { flex: 1, height: 4, backgroundColor: color.line },
  stepDone: { backgroundColor: color.tide },
});
