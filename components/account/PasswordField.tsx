import { type ComponentProps, useState } from 'react';
import type { FieldValues } from 'react-hook-form';

import { BoundText } from '@/components/forms';
import { Checkbox } from '@/components/ui';

type BoundTextProps<Typed extends FieldValues, Read> = ComponentProps<typeof BoundText<Typed, Read>>;

/** A password; what is typed can be shown, as on phones much is mistyped. */
export function PasswordField<Typed extends FieldValues, Read>(
  props: Omit<BoundTextProps<Typed, Read>, 'secret' | 'footer'>,
) {
  const [isShown, setIsShown] = useState(false);
  return (
    <BoundText
      {...props}
      secret={!isShown}
      footer={<Checkbox label="Show the password" checked={isShown} onChange={setIsShown} />}
    />
  );
}
