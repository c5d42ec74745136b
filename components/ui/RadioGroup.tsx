import type { Ref } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { color, radius, space, target } from '../theme';
import { FieldFrame, type FieldProps } from './Field';
import type { Option } from './SelectField';
import { Quiet, Text } from './Text';
import { useRovingFocus } from './useRovingFocus';

export interface ChoiceProps<V extends string> extends FieldProps {
  value: V | '';
  onChange: (value: V) => void;
  onBlur?: () => void;
  options: readonly Option<V>[];
  /** The one that the Tab key stops at. */
  ref?: Ref<View>;
}

const useChoice = <V extends string>({
  value,
  onChange,
  options,
}: Pick<ChoiceProps<V>, 'value' | 'onChange' | 'options'>) =>
  useRovingFocus(
    options.length,
    options.findIndex((option) => option.value === value),
    (index) => {
      const option = options[index];
      if (option && !option.disabled) onChange(option.value);
    },
  );

/** One of a few, each on its own line with room for an explanation. */
export function RadioGroup<V extends string>({
  value,
  onChange,
  onBlur,
  options,
  disabled,
  ref,
  ...field
}: ChoiceProps<V>) {
  const roving = useChoice({ value, onChange, options });
  const hold = (item: View | null) => {
    if (typeof ref === 'function') ref(item);
    else if (ref) ref.current = item;
  };
  return (
    <FieldFrame {...field} isGroup>
      {({ labelId, describedBy }) => (
        <View role="radiogroup" aria-labelledby={labelId} aria-describedby={describedBy} style={styles.list}>
          {options.map((option, index) => {
            const isChosen = option.value === value;
            const stop = roving(index);
            return (
              <Pressable
                key={option.value}
                {...stop}
                ref={(item) => {
                  stop.ref(item);
                  if (stop.tabIndex === 0) hold(item);
                }}
                role="radio"
                aria-checked={isChosen}
                aria-disabled={disabled || option.disabled}
                disabled={disabled || option.disabled}
                onPress={() => onChange(option.value)}
                onBlur={onBlur}
                style={styles.line}
              >
                <View style={[styles.ring, isChosen && styles.ringChosen]}>
                  {isChosen && <View style={styles.dot} />}
                </View>
                <View style={styles.words}>
                  <Text tone={option.disabled ? 'quiet' : 'ink'}>{option.label}</Text>
                  {option.hint && <Quiet>{option.hint}</Quiet>}
                </View>
              </Pressable>
            );
          })}
        </View>
      )}
    </FieldFrame>
  );
}

export interface SegmentedProps<V extends string> {
  /** What is being chosen, for screen readers. */
  label: string;
  value: V;
  onChange: (value: V) => void;
  options: readonly Option<V>[];
  /** Takes the whole width, in equal parts. */
  wide?: boolean;
}

/** One of two to four short words side by side; takes effect at once. */
export function Segmented<V extends string>({
  label,
  value,
  onChange,
  options,
  wide = false,
}: SegmentedProps<V>) {
  const roving = useChoice({ value, onChange, options });
  return (
    <View role="radiogroup" aria-label={label} style={[styles.segments, wide && styles.segmentsWide]}>
      {options.map((option, index) => {
        const isChosen = option.value === value;
        return (
          <Pressable
            key={option.value}
            {...roving(index)}
            role="radio"
            aria-checked={isChosen}
            aria-disabled={option.disabled}
            disabled={option.disabled}
            onPress={() => onChange(option.value)}
            style={({ hovered }) => [
              styles.segment,
              index > 0 && styles.segmentNext,
              wide && styles.segmentWide,
              hovered && styles.segmentHovered,
              isChosen && styles.segmentChosen,
            ]}
          >
            <Text
              weight={isChosen ? 'strong' : 'regular'}
              align="center"
              tone={isChosen ? 'onTide' : option.disabled ? 'quiet' : 'ink'}
            >
              {option.label}
            </Text>
          </Pressable>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { gap: space.xs },
  line: {
    flexDirection: 'row',
    gap: space.m,
    paddingVertical: space.s,
    minHeight: target,
    borderRadius: radius.small,
  },
  ring: {
    width: 22,
    height: 22,
    borderRadius: 11,
    borderWidth: 1.5,
    borderColor: color.quiet,
    backgroundColor: color.surface,
    alignItems: 'center',
    justifyContent: 'center',
  },
  ringChosen: { borderColor: color.tide },
  dot: { width: 12, height: 12, borderRadius: 6, backgroundColor: color.tide },
  words: { flex: 1, minWidth: 0 },
  segments: {
    flexDirection: 'row',
    alignSelf: 'flex-start',
    borderWidth: 1,
    borderColor: color.quiet,
    borderRadius: radius.control,
    backgroundColor: color.surface,
    overflow: 'hidden',
    maxWidth: '100%',
  },
  segmentsWide: { alignSelf: 'stretch' },
  segment: {
    minHeight: target - 2,
    paddingHorizontal: space.l,
    justifyContent: 'center',
    flexShrink: 1,
    outlineOffset: -4,
  },
  segmentWide: { flex: 1, paddingHorizontal: space.xs },
  segmentNext: { borderLeftWidth: 1, borderLeftColor: color.line },
  segmentHovered: { backgroundColor: color.wash },
  segmentChosen: { backgroundColor: color.tide, outlineColor: color.onTide },
});
