import { StyleSheet, View } from 'react-native';
import type { Ref } from 'react';
import { FieldFrame, type FieldFrameProps, type FieldProps } from './Field';
import { Icon } from './Icon';
import { nativeControl, nativeSelect } from './nativeControl';

export interface Option<V extends string = string> {
  value: V;
  label: string;
  /** Shown under the label by radio groups. */
  hint?: string;
  disabled?: boolean;
}

export interface SelectFieldProps<V extends string> extends FieldProps, Pick<FieldFrameProps, 'footer'> {
  /** Empty text while nothing is chosen. */
  value: V | '';
  onChange: (value: V) => void;
  onBlur?: () => void;
  options: readonly Option<V>[];
  /** The line shown while nothing is chosen. */
  prompt?: string;
  ref?: Ref<HTMLSelectElement>;
}

export function SelectField<V extends string>({
  value,
  onChange,
  onBlur,
  options,
  prompt = 'Choose',
  ref,
  disabled = false,
  ...field
}: SelectFieldProps<V>) {
  return (
    <FieldFrame {...field}>
      {({ id, describedBy, isInvalid }) => (
        <View>
          <select
            ref={ref}
            id={id}
            aria-describedby={describedBy}
            aria-invalid={isInvalid}
            aria-required={!field.optional}
            disabled={disabled}
            value={value}
            onBlur={onBlur}
            onChange={(event) => {
              const chosen = options.find((option) => option.value === event.target.value);
              if (chosen) onChange(chosen.value);
            }}
            style={{ ...nativeControl(isInvalid, disabled), ...nativeSelect.padded }}
          >
            {value === '' && (
              <option value="" disabled>
                {prompt}
              </option>
            )}
            {options.map((option) => (
              <option key={option.value} value={option.value} disabled={option.disabled}>
                {option.label}
              </option>
            ))}
          </select>
          <View style={styles.mark}>
            <Icon name="open" size={18} tone="quiet" />
          </View>
        </View>
      )}
    </FieldFrame>
  );
}

const styles = StyleSheet.create({
  mark: {
    position: 'absolute',
    right: 14,
    top: 0,
    bottom: 0,
    justifyContent: 'center',
    pointerEvents: 'none',
  },
});
