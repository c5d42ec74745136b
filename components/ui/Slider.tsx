import { useId } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, space, target } from '../theme';
import { Figure, Quiet, Text } from './Text';

export interface SliderProps {
  label: string;
  value: number;
  min: number;
  max: number;
  step: number;
  onChange: (value: number) => void;
  /** A value in words, with its unit. */
  show: (value: number) => string;
  /** Beside the value: "as it is". */
  note?: string;
}

/** A number that is tried out rather than typed; arrow keys move it by its step. */
export function Slider({ label, value, min, max, step, onChange, show, note }: SliderProps) {
  const id = useId();
  return (
    <View>
      <View style={styles.words}>
        <Text weight="strong" nativeID={id}>
          {label}
        </Text>
        <Text>
          <Figure>{show(value)}</Figure>
          {note && <Quiet>{`  ${note}`}</Quiet>}
        </Text>
      </View>
      {/* The browser's own: touch, keys and screen readers know it. */}
      <input
        type="range"
        aria-labelledby={id}
        aria-valuetext={show(value)}
        {...{ value, min, max, step }}
        onChange={(event) => onChange(Number(event.target.value))}
        style={{ width: '100%', height: target, margin: 0, accentColor: color.tide }}
      />
      <View style={styles.ends} aria-hidden>
        <Quiet>{show(min)}</Quiet>
        <Quiet>{show(max)}</Quiet>
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  words: { flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'space-between', columnGap: space.m },
  ends: { flexDirection: 'row', justifyContent: 'space-between', marginTop: -space.s },
});
