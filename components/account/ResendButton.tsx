import { Button, useToast } from '@/components/ui';
import { useResendVerification } from '@/lib/client/accounts';

/** Asks for the mail that confirms an address once more. */
export function ResendButton({ email }: { email: string }) {
  const toast = useToast();
  const resend = useResendVerification();
  const send = () =>
    resend.mutate(
      { email },
      {
        onSuccess: () => toast({ text: 'Another mail is on its way; the link before it is void.' }),
        onError: ({ message }) => toast({ text: message }),
      },
    );
  return <Button label="Send it again" busy={resend.isPending} onPress={send} />;
}
