import { StyleSheet, TextInput, View } from 'react-native';
import type { Ref } from 'react';
import { color, font, radius, size, space } from '../theme';
import { controlStyles, FieldFrame, type FieldFrameProps, type FieldProps } from './Field';
import { Quiet } from './Text';
import { nativeSelect } from './nativeControl';

export interface NumberFieldProps<U extends string = string>
  extends FieldProps, Pick<FieldFrameProps, 'footer'> {
  /** What was typed, as typed: "226,4" stays so until the form reads it. */
  value: string;
  onChange: (text: string) => void;
  onBlur?: () => void;
  unit: U;
  /** Other units it may be typed in; the field then shows a switch in the unit's place. */
  units?: readonly U[];
  onUnitChange?: (unit: U) => void;
  /** Whole numbers only: brings the keyboard without a decimal mark. */
  whole?: boolean;
  ref?: Ref<TextInput>;
}

/** A number with its unit inside the field. Reading and checking the text is the form's work. */
export function NumberField<U extends string = string>({
  value,
  onChange,
  onBlur,
  unit,
  units,
  onUnitChange,
  whole = false,
  ref,
  disabled = false,
  ...field
}: NumberFieldProps<U>) {
  const canSwitch = units !== undefined && units.length > 1 && onUnitChange !== undefined;
  return (
    <FieldFrame {...field} hasUnit={unit !== '' && !canSwitch}>
      {({ id, labelId, unitId, describedBy, isInvalid }) => (
        <View style={[controlStyles.box, isInvalid && controlStyles.invalid, disabled && controlStyles.off]}>
          <TextInput
            ref={ref}
            id={id}
            aria-labelledby={labelId}
            aria-describedby={describedBy}
            aria-invalid={isInvalid}
            aria-required={!field.optional}
            value={value}
            onChangeText={onChange}
            onBlur={onBlur}
            inputMode={whole ? 'numeric' : 'decimal'}
            autoComplete="off"
            autoCorrect={false}
            readOnly={disabled}
            maxLength={40}
            style={styles.input}
          />
          {canSwitch ? (
            <select
              aria-label={`${field.label}: unit`}
              value={unit}
              disabled={disabled}
              onChange={(event) => {
                const chosen = units.find((one) => one === event.target.value);
                if (chosen) onUnitChange(chosen);
              }}
              style={nativeSelect.inField}
            >
              {units.map((one) => (
                <option key={one} value={one}>
                  {one}
                </option>
              ))}
            </select>
          ) : (
            unit && (
              <View style={styles.unit}>
                <Quiet size="body" nativeID={unitId}>
                  {unit}
                </Quiet>
              </View>
            )
          )}
        </View>
      )}
    </FieldFrame>
  );
}

const styles = StyleSheet.create({
  input: {
    flex: 1,
    minWidth: 0,
    paddingHorizontal: space.l,
    borderRadius: radius.control,
    color: color.ink,
    fontFamily: font.figures,
    fontSize: size.heading,
  },
  unit: { justifyContent: 'center', paddingRight: space.l },
});
