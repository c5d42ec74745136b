import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';

import { Banner } from '@/components/ui';
import { useResendVerification } from '@/lib/client/accounts';
import { resendVerificationRequestSchema } from '@/lib/contract/accounts';

import { EmailField } from './AccountField';
import { AccountForm } from './AccountForm';
import { formProblem, showFieldErrors } from './formProblem';

/** Asks for the mail that confirms an address, when its link is lost or spent. */
export function ResendForm() {
  const form = useForm({
    resolver: zodResolver(resendVerificationRequestSchema),
    mode: 'onTouched',
    defaultValues: { email: '' },
  });
  const resend = useResendVerification();
  const submit = form.handleSubmit((values) =>
    resend.mutate(values, { onError: (error) => showFieldErrors(error, form) }),
  );
  if (resend.isSuccess)
    return (
      <Banner kind="done" title="Check your mail">
        {`If ${resend.variables.email} waits to be confirmed, another mail is on its way.`}
      </Banner>
    );
  return (
    <AccountForm
      label="Send another link"
      onSubmit={submit}
      busy={resend.isPending}
      problem={formProblem(resend.error, ['email'])}
    >
      <EmailField control={form.control} name="email" label="E-mail address" onSubmit={submit} />
    </AccountForm>
  );
}
