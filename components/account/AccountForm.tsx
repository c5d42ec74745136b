import type { FormEvent, ReactNode } from 'react';

import { Banner, Button, Stack } from '@/components/ui';

interface AccountFormProps {
  /** What the form does, on its button and for screen readers. */
  label: string;
  onSubmit: () => void;
  busy: boolean;
  /** What went wrong with no field of its own. */
  problem?: string;
  children: ReactNode;
}

/** A form element, so that password managers know where they are; Enter in a field sends it too. */
export function AccountForm({ label, onSubmit, busy, problem, children }: AccountFormProps) {
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onSubmit();
  };
  return (
    <form onSubmit={submit} noValidate aria-label={label}>
      <Stack gap="xl">
        {children}
        {problem && (
          <Banner kind="error" title="That did not work">
            {problem}
          </Banner>
        )}
        <Button kind="primary" wide label={label} busy={busy} onPress={onSubmit} />
      </Stack>
    </form>
  );
}
