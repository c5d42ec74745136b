import type { ReactNode } from 'react';
import type { Control, FieldValues } from 'react-hook-form';

import { Form, FormError, SubmitButton } from '@/components/forms';
import { Stack } from '@/components/ui';

interface AccountFormProps<Typed extends FieldValues, Read> {
  control: Control<Typed, unknown, Read>;
  /** What the form does, on its button and for screen readers. */
  label: string;
  onSubmit: () => void;
  children: ReactNode;
}

/** The fields of an account page, what went wrong, and the one button. */
export function AccountForm<Typed extends FieldValues, Read>({
  control,
  label,
  onSubmit,
  children,
}: AccountFormProps<Typed, Read>) {
  return (
    <Form label={label} onSubmit={onSubmit}>
      <Stack gap="xl">
        {children}
        <FormError control={control} title="That did not work" />
        <SubmitButton control={control} label={label} wide onPress={onSubmit} />
      </Stack>
    </Form>
  );
}
