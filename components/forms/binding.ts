import {
  useController,
  type Control,
  type FieldPath,
  type FieldPathByValue,
  type FieldValues,
} from 'react-hook-form';

/** Which field of which form; `Value` is what it may hold. */
export interface Bound<Form extends FieldValues, Value, Read = unknown> {
  control: Control<Form, unknown, Read>;
  name: FieldPathByValue<Form, Value>;
}

/** A field's value, its handlers and what is wrong with it. */
export function useBound<Form extends FieldValues, Read>(
  control: Control<Form, unknown, Read>,
  name: FieldPath<Form>,
) {
  const { field, fieldState } = useController({ control, name });
  return { ...field, error: fieldState.error?.message };
}
