import type { ComponentProps } from 'react';
import type { FieldValues } from 'react-hook-form';

import { BoundText } from '@/components/forms';

type BoundTextProps<Typed extends FieldValues, Read> = ComponentProps<typeof BoundText<Typed, Read>>;

/** The address an account goes by; password managers know it as the user's name. */
export function EmailField<Typed extends FieldValues, Read>({
  label = 'E-mail address',
  autoComplete = 'username',
  ...props
}: Omit<BoundTextProps<Typed, Read>, 'label' | 'inputMode' | 'autoComplete'> &
  Partial<Pick<BoundTextProps<Typed, Read>, 'label' | 'autoComplete'>>) {
  return <BoundText {...props} label={label} inputMode="email" autoComplete={autoComplete} />;
}
