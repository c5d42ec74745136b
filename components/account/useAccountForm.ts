import type { DefaultValues, FieldValues } from 'react-hook-form';
import type { z } from 'zod';

import { useServerErrors, useValidatedForm, type ValidatedForm } from '@/components/forms';

/** A form of the account pages: `submit` checks it, sends it and tells it what the server refused. */
export function useAccountForm<Typed extends FieldValues, Read>(
  schema: z.ZodType<Read, Typed>,
  defaultValues: DefaultValues<Typed>,
  send: (values: Read) => Promise<unknown>,
  onSent: (form: ValidatedForm<Typed, Read>) => void = () => {},
) {
  const form = useValidatedForm(schema, defaultValues);
  const showErrors = useServerErrors(form);
  const submit = form.handleSubmit((values) => send(values).then(() => onSent(form), showErrors));
  return { form, control: form.control, submit: () => void submit() };
}
