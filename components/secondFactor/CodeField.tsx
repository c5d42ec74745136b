import type { ComponentProps } from 'react';
import type { FieldValues } from 'react-hook-form';

import { BoundText } from '@/components/forms';

type BoundTextProps<Typed extends FieldValues, Read> = ComponentProps<typeof BoundText<Typed, Read>>;

interface CodeFieldProps<Typed extends FieldValues, Read> extends Pick<
  BoundTextProps<Typed, Read>,
  'control' | 'name' | 'autoFocus'
> {
  /** A code of the app, or one of the recovery codes. */
  kind?: 'app' | 'recovery';
  hint?: string;
}

/** The code that follows a password. Phones offer to fill it in, and show digits for one of the app. */
export function CodeField<Typed extends FieldValues, Read>({
  kind = 'app',
  hint,
  ...props
}: CodeFieldProps<Typed, Read>) {
  return kind === 'app' ? (
    <BoundText
      {...props}
      label="Code"
      hint={hint ?? 'The six digits your authenticator app shows for Ebbline.'}
      inputMode="numeric"
      autoComplete="one-time-code"
      maxLength={12}
      figures
    />
  ) : (
    <BoundText
      {...props}
      label="Recovery code"
      hint={hint ?? 'One of the ten you kept when you set it up. Each can be used once.'}
      autoComplete="off"
      maxLength={20}
      figures
    />
  );
}
