import { useId, type CSSProperties, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, radius, space } from '../theme';
import { Quiet, Text } from './Text';

/** What every field has around its input. */
export interface FieldProps {
  label: string;
  /** Explains what to enter; stays visible. */
  hint?: string;
  /** What is wrong and what to do about it. */
  error?: string;
  /** A short remark at the label's right: "whole bank". */
  note?: string;
  /** Said in words beside the label; fields are required otherwise. */
  optional?: boolean;
  disabled?: boolean;
}

/** What the input needs so that label, hint and error belong to it. */
export interface InputBinding {
  id: string;
  labelId: string;
  unitId: string;
  describedBy: string | undefined;
  isInvalid: boolean;
}

export interface FieldFrameProps extends FieldProps {
  children: (binding: InputBinding) => ReactNode;
  /** Said with the hint; the input shows it under the id that binding.unitId gives. */
  hasUnit?: boolean;
  /** Right below the input: a source picker, a computed remark. */
  footer?: ReactNode;
  /** For inputs that are no single element (groups); their label is then no `<label>`. */
  isGroup?: boolean;
}

const labelBox: CSSProperties = { display: 'block', minWidth: 0 };

/** Label above, input, then hint and error, with their ids tied together. */
export function FieldFrame({
  label,
  hint,
  error,
  note,
  optional,
  children,
  footer,
  isGroup = false,
  hasUnit = false,
}: FieldFrameProps) {
  const id = useId();
  const labelId = `${id}label`;
  const unitId = `${id}unit`;
  const describedBy =
    [hasUnit && unitId, error && `${id}error`, hint && `${id}hint`].filter(Boolean).join(' ') || undefined;
  const labelText = (
    <Text weight="strong" nativeID={labelId}>
      {label}
      {optional && <Quiet>{'  optional'}</Quiet>}
    </Text>
  );
  return (
    <View style={styles.frame}>
      <View style={styles.top}>
        {isGroup ? (
          labelText
        ) : (
          <label htmlFor={id} style={labelBox}>
            {labelText}
          </label>
        )}
        {note && <Quiet>{note}</Quiet>}
      </View>
      {children({ id, labelId, unitId, describedBy, isInvalid: Boolean(error) })}
      {error && (
        <Text size="small" tone="rust" nativeID={`${id}error`} aria-live="polite">
          {error}
        </Text>
      )}
      {hint && <Quiet nativeID={`${id}hint`}>{hint}</Quiet>}
      {footer}
    </View>
  );
}

export const controlStyles = StyleSheet.create({
  box: {
    minHeight: 48,
    flexDirection: 'row',
    alignItems: 'stretch',
    borderWidth: 1.5,
    borderColor: color.quiet,
    borderRadius: radius.control,
    backgroundColor: color.surface,
  },
  invalid: { borderColor: color.rust },
  off: { backgroundColor: color.wash, borderColor: color.line },
});

const styles = StyleSheet.create({
  frame: { gap: 6, minWidth: 0 },
  top: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.m },
});
