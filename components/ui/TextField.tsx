import type { Ref } from 'react';
import { StyleSheet, TextInput, View, type TextInputProps } from 'react-native';
import { color, font, radius, size, space } from '../theme';
import { controlStyles, FieldFrame, type FieldFrameProps, type FieldProps } from './Field';
import { Quiet } from './Text';

export interface TextFieldProps extends FieldProps, Pick<FieldFrameProps, 'footer'> {
  value: string;
  onChange: (text: string) => void;
  onBlur?: () => void;
  onSubmit?: () => void;
  inputMode?: 'text' | 'email' | 'search' | 'url' | 'numeric' | 'decimal';
  autoComplete?: TextInputProps['autoComplete'];
  autoFocus?: boolean;
  /** Hides what is typed, for passwords. */
  secret?: boolean;
  maxLength?: number;
  /** Lines shown; more than one makes a text area that Enter breaks. */
  lines?: number;
  /** Figures, set in the mono face and larger. */
  figures?: boolean;
  unit?: string;
  ref?: Ref<TextInput>;
}

export function TextField({
  value,
  onChange,
  onBlur,
  onSubmit,
  inputMode = 'text',
  autoComplete,
  autoFocus,
  secret = false,
  maxLength,
  lines = 1,
  figures = false,
  unit,
  ref,
  disabled = false,
  ...field
}: TextFieldProps) {
  return (
    <FieldFrame {...field} hasUnit={unit !== undefined}>
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
            onSubmitEditing={onSubmit}
            inputMode={inputMode}
            autoComplete={autoComplete}
            autoCapitalize={secret || inputMode !== 'text' ? 'none' : 'sentences'}
            autoCorrect={!secret && inputMode === 'text'}
            autoFocus={autoFocus}
            secureTextEntry={secret}
            maxLength={maxLength}
            multiline={lines > 1}
            rows={lines > 1 ? lines : undefined}
            readOnly={disabled}
            style={[styles.input, figures && styles.figures, lines > 1 && styles.area]}
          />
          {unit && (
            <View style={styles.unit}>
              <Quiet size="body" nativeID={unitId}>
                {unit}
              </Quiet>
            </View>
          )}
        </View>
      )}
    </FieldFrame>
  );
}

export type TextAreaProps = Omit<TextFieldProps, 'inputMode' | 'figures' | 'unit' | 'secret' | 'onSubmit'>;

export function TextArea({ lines = 4, ...rest }: TextAreaProps) {
  return <TextField {...rest} lines={lines} />;
}

const styles = StyleSheet.create({
  input: {
    flex: 1,
    minWidth: 0,
    paddingHorizontal: space.l,
    paddingVertical: space.s,
    borderRadius: radius.control,
    color: color.ink,
    fontFamily: font.words,
    // Below 16 px phones zoom the page when the field takes the focus.
    fontSize: size.lead,
  },
  figures: { fontFamily: font.figures, fontSize: size.heading },
  area: { lineHeight: 24, paddingVertical: space.m },
  unit: { justifyContent: 'center', paddingRight: space.l },
});
