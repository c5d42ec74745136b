import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';

import { Link, Page, PageHead } from '@/components/ui';
import { useRequestReset } from '@/lib/client/accounts';
import { requestResetRequestSchema } from '@/lib/contract/accounts';

import { EmailField } from './AccountField';
import { AccountForm } from './AccountForm';
import { CheckMail } from './CheckMail';
import { formProblem, showFieldErrors } from './formProblem';

/** Asks for a mail with the link to choose a new password. */
export function RequestResetPage({ email = '' }: { email?: string }) {
  const form = useForm({
    resolver: zodResolver(requestResetRequestSchema),
    mode: 'onTouched',
    defaultValues: { email },
  });
  const request = useRequestReset();
  const submit = form.handleSubmit((values) =>
    request.mutate(values, { onError: (error) => showFieldErrors(error, form) }),
  );

  if (request.isSuccess)
    return (
      <CheckMail email={request.variables.email} onOtherAddress={() => request.reset()}>
        If the address has an account, the link in the mail lets you choose a new password. It can be used
        once, within an hour.
      </CheckMail>
    );
  return (
    <Page narrow>
      <PageHead
        title="Choose a new password"
        sub="We mail a link to your address; it opens the page where you choose."
      />
      <AccountForm
        label="Mail me the link"
        onSubmit={submit}
        busy={request.isPending}
        problem={formProblem(request.error, ['email'])}
      >
        <EmailField control={form.control} name="email" label="E-mail address" onSubmit={submit} />
      </AccountForm>
      <Link href="/sign-in">Back to signing in</Link>
    </Page>
  );
}
