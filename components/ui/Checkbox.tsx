import { useId, type Ref } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { color, radius, space, target } from '../theme';
import { Icon } from './Icon';
import { Quiet, Text } from './Text';

export interface CheckboxProps {
  label: string;
  checked: boolean;
  onChange: (checked: boolean) => void;
  onBlur?: () => void;
  hint?: string;
  error?: string;
  disabled?: boolean;
  ref?: Ref<View>;
}

export function Checkbox({
  label,
  checked,
  onChange,
  onBlur,
  hint,
  error,
  disabled = false,
  ref,
}: CheckboxProps) {
  const id = useId();
  const describedBy = [error && `${id}error`, hint && `${id}hint`].filter(Boolean).join(' ') || undefined;
  return (
    <View>
      <Pressable
        ref={ref}
        role="checkbox"
        aria-label={label}
        aria-checked={checked}
        aria-disabled={disabled}
        aria-describedby={describedBy}
        aria-invalid={Boolean(error)}
        disabled={disabled}
        onPress={() => onChange(!checked)}
        onBlur={onBlur}
        onKeyDown={(event) => {
          if (event.key !== ' ' || disabled) return;
          event.preventDefault();
          onChange(!checked);
        }}
        style={styles.line}
      >
        <View style={[styles.box, checked && styles.boxChecked, Boolean(error) && styles.boxInvalid]}>
          {checked && <Icon name="check" size={16} tone="onTide" />}
        </View>
        <View style={styles.words}>
          <Text tone={disabled ? 'quiet' : 'ink'}>{label}</Text>
        </View>
      </Pressable>
      {error && (
        <Text size="small" tone="rust" nativeID={`${id}error`} style={styles.below}>
          {error}
        </Text>
      )}
      {hint && (
        <Quiet nativeID={`${id}hint`} style={styles.below}>
          {hint}
        </Quiet>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  line: {
    flexDirection: 'row',
    gap: space.m,
    alignItems: 'center',
    minHeight: target,
    borderRadius: radius.small,
  },
  box: {
    width: 22,
    height: 22,
    borderRadius: radius.small,
    borderWidth: 1.5,
    borderColor: color.quiet,
    backgroundColor: color.surface,
    alignItems: 'center',
    justifyContent: 'center',
  },
  boxChecked: { backgroundColor: color.tide, borderColor: color.tide },
  boxInvalid: { borderColor: color.rust },
  words: { flex: 1, minWidth: 0 },
  below: { marginLeft: 34 },
});
