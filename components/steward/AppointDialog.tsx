import { EmailField } from '@/components/account/EmailField';
import { PasswordField } from '@/components/account/PasswordField';
import { useAccountForm } from '@/components/account/useAccountForm';
import { BoundRadio, chosen, Form, FormError, SubmitButton } from '@/components/forms';
import { Button, Dialog, type Option, useToast } from '@/components/ui';
import { useAppoint } from '@/lib/client/steward';
import { type AppointedRole, appointedRoleSchema, appointRequestSchema } from '@/lib/contract/steward';

const roles: readonly Option[] = [
  { value: 'moderator', label: 'Moderator', hint: 'Screens checks. Never sees whose they are.' },
  { value: 'steward', label: 'Steward', hint: 'Runs the exchange, and can appoint others.' },
] satisfies readonly Option<AppointedRole>[];

const formSchema = appointRequestSchema.extend({ role: chosen(appointedRoleSchema) });

/** Gives somebody with an account a role. */
export function AppointDialog({ onClose }: { onClose: () => void }) {
  const toast = useToast();
  const appoint = useAppoint();
  const { control, submit } = useAccountForm(
    formSchema,
    { email: '', role: '', currentPassword: '' },
    appoint.mutateAsync,
    () => {
      toast({ text: 'Appointed. A mail says so.' });
      onClose();
    },
  );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Appoint someone"
      actions={
        <>
          <Button label="Appoint nobody" onPress={onClose} />
          <SubmitButton kind="primary" control={control} label="Appoint" onPress={submit} />
        </>
      }
    >
      <Form label="Appoint" onSubmit={submit}>
        <EmailField
          control={control}
          name="email"
          label="E-mail address of their account"
          autoComplete="off"
        />
        <BoundRadio control={control} name="role" label="Role" options={roles} />
        <PasswordField
          control={control}
          name="currentPassword"
          label="Your own password"
          autoComplete="current-password"
        />
        <FormError control={control} title="Nobody was appointed" />
      </Form>
    </Dialog>
  );
}
