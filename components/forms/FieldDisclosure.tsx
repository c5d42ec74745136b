import { useState, type ReactNode } from 'react';
import { get, useFormState, useWatch, type Control, type FieldPath, type FieldValues } from 'react-hook-form';

import { Disclosure } from '../ui';

export interface FieldDisclosureProps<Form extends FieldValues, Read> {
  control: Control<Form, unknown, Read>;
  /** The fields folded away in it. */
  names: readonly FieldPath<Form>[];
  label: string;
  children: ReactNode;
}

/** Fields folded away until they are asked for: open at once where one of them is filled, and while one is wrong. */
export function FieldDisclosure<Form extends FieldValues, Read>({
  control,
  names,
  label,
  children,
}: FieldDisclosureProps<Form, Read>) {
  const { errors } = useFormState({ control });
  const values: readonly unknown[] = useWatch({ control, name: names });
  const hasError = names.some((name) => get(errors, name) !== undefined);
  const isFilled = values.some((value) => value !== '');
  const [wasFilled, setWasFilled] = useState(isFilled);
  const [isOpen, setIsOpen] = useState(isFilled || hasError);
  // Filled from elsewhere, such as by a draft put back; what the reader has folded since stays so.
  if (isFilled !== wasFilled) {
    setWasFilled(isFilled);
    if (isFilled) setIsOpen(true);
  }
  // Once opened by an error it does not fold while that is being mended.
  if (hasError && !isOpen) setIsOpen(true);
  return (
    <Disclosure label={label} open={{ isOpen, onToggle: setIsOpen }}>
      {children}
    </Disclosure>
  );
}
