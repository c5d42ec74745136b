import type { ComponentProps } from 'react';
import type { FieldValues } from 'react-hook-form';

import { BoundText } from '@/components/forms';

type BoundTextProps<Typed extends FieldValues, Read> = ComponentProps<typeof BoundText<Typed, Read>>;

/** The address an account goes by; password managers know it as the user's name. */
export function EmailField<Typed extends FieldValues, Read>(
  props: Omit<BoundTextProps<Typed, Read>, 'label' | 'inputMode' | 'autoComplete'>,
) {
  return <BoundText {...props} label="E-mail address" inputMode="email" autoComplete="username" />;
}
