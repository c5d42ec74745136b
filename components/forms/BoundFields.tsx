import type { FieldValues } from 'react-hook-form';
import {
  Checkbox,
  DateField,
  MonthField,
  RadioGroup,
  SelectField,
  TextField,
  type CheckboxProps,
  type ChoiceProps,
  type DateFieldProps,
  type SelectFieldProps,
  type TextFieldProps,
} from '../ui';
import { useBound, type Bound } from './binding';

type Own = 'value' | 'onChange' | 'onBlur' | 'error' | 'ref';

export function BoundText<Form extends FieldValues, Read>({
  control,
  name,
  ...rest
}: Bound<Form, string, Read> & Omit<TextFieldProps, Own>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return <TextField {...rest} ref={ref} value={value} onChange={onChange} onBlur={onBlur} error={error} />;
}

export function BoundTextArea<Form extends FieldValues, Read>({
  lines = 4,
  ...rest
}: Bound<Form, string, Read> & Omit<TextFieldProps, Own>) {
  return <BoundText {...rest} lines={lines} />;
}

export function BoundSelect<Form extends FieldValues, Read, V extends string>({
  control,
  name,
  ...rest
}: Bound<Form, V | '', Read> & Omit<SelectFieldProps<V>, Own>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return <SelectField {...rest} ref={ref} value={value} onChange={onChange} onBlur={onBlur} error={error} />;
}

export function BoundRadio<Form extends FieldValues, Read, V extends string>({
  control,
  name,
  ...rest
}: Bound<Form, V | '', Read> & Omit<ChoiceProps<V>, Own>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return <RadioGroup {...rest} ref={ref} value={value} onChange={onChange} onBlur={onBlur} error={error} />;
}

export function BoundDate<Form extends FieldValues, Read>({
  control,
  name,
  ...rest
}: Bound<Form, string, Read> & Omit<DateFieldProps, Own>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return <DateField {...rest} ref={ref} value={value} onChange={onChange} onBlur={onBlur} error={error} />;
}

export function BoundMonth<Form extends FieldValues, Read>({
  control,
  name,
  ...rest
}: Bound<Form, string, Read> & Omit<DateFieldProps, Own>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return <MonthField {...rest} ref={ref} value={value} onChange={onChange} onBlur={onBlur} error={error} />;
}

export function BoundCheckbox<Form extends FieldValues, Read>({
  control,
  name,
  ...rest
}: Bound<Form, boolean, Read> & Omit<CheckboxProps, 'checked' | 'onChange' | 'onBlur' | 'error' | 'ref'>) {
  const { ref, value, onChange, onBlur, error } = useBound(control, name);
  return (
    <Checkbox
      {...rest}
      ref={ref}
      checked={value === true}
      onChange={onChange}
      onBlur={onBlur}
      error={error}
    />
  );
}
