import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, type DefaultValues, type FieldValues, type UseFormReturn } from 'react-hook-form';
import type { z } from 'zod';

/** A form whose fields hold what was typed (`Typed`) and whose schema reads it into what is sent (`Read`). */
export type ValidatedForm<Typed extends FieldValues, Read> = UseFormReturn<Typed, unknown, Read>;

/** react-hook-form with our rules: a field is checked when it is left, from then on with every change. */
export function useValidatedForm<Typed extends FieldValues, Read>(
  schema: z.ZodType<Read, Typed>,
  defaultValues: DefaultValues<Typed>,
): ValidatedForm<Typed, Read> {
  return useForm<Typed, unknown, Read>({
    resolver: zodResolver(schema),
    mode: 'onTouched',
    reValidateMode: 'onChange',
    defaultValues,
  });
}
