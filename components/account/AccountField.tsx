import { useState } from 'react';
import { type Control, Controller, type FieldPath, type FieldValues } from 'react-hook-form';

import { Checkbox, Stack, TextField, type TextFieldProps } from '@/components/ui';

interface AccountFieldProps<Values extends FieldValues> extends Pick<
  TextFieldProps,
  'autoComplete' | 'hint' | 'onSubmit'
> {
  control: Control<Values>;
  name: FieldPath<Values>;
  label: string;
}

/** An e-mail field bound to its form. */
export function EmailField<Values extends FieldValues>({
  control,
  name,
  label,
  ...rest
}: AccountFieldProps<Values>) {
  return (
    <Controller
      control={control}
      name={name}
      render={({ field: { ref, ...field }, fieldState }) => (
        <TextField
          {...rest}
          {...field}
          ref={ref}
          label={label}
          inputMode="email"
          autoComplete="username"
          error={fieldState.error?.message}
        />
      )}
    />
  );
}

/** A password field bound to its form; what is typed can be shown, as on phones much is mistyped. */
export function PasswordField<Values extends FieldValues>({
  control,
  name,
  label,
  ...rest
}: AccountFieldProps<Values>) {
  const [isShown, setIsShown] = useState(false);
  return (
    <Stack gap="xs">
      <Controller
        control={control}
        name={name}
        render={({ field: { ref, ...field }, fieldState }) => (
          <TextField
            {...rest}
            {...field}
            ref={ref}
            label={label}
            secret={!isShown}
            error={fieldState.error?.message}
          />
        )}
      />
      <Checkbox label="Show the password" checked={isShown} onChange={setIsShown} />
    </Stack>
  );
}
