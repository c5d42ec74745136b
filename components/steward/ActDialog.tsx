import { PasswordField } from '@/components/account/PasswordField';
import { useAccountForm } from '@/components/account/useAccountForm';
import { BoundTextArea, Form, FormError, SubmitButton } from '@/components/forms';
import { Button, Dialog, Text, useToast } from '@/components/ui';
import { type PersonAct, useChangePerson } from '@/lib/client/steward';
import { changePersonRequestSchema, type Person } from '@/lib/contract/steward';

import { actWords, nameOf } from './personWords';

interface ActDialogProps {
  person: Person;
  act: PersonAct;
  onDone?: () => void;
  onClose: () => void;
}

/** Asks for the reason and one's own password before something is done to an account. */
export function ActDialog({ person, act, onDone, onClose }: ActDialogProps) {
  const toast = useToast();
  const change = useChangePerson(person.id, act);
  const words = actWords[act];
  const { control, submit } = useAccountForm(
    changePersonRequestSchema,
    { reason: '', currentPassword: '' },
    change.mutateAsync,
    () => {
      toast({ text: words.done });
      onClose();
      onDone?.();
    },
  );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={words.title(nameOf(person))}
      actions={
        <>
          <Button label="Leave it as it is" onPress={onClose} />
          <SubmitButton
            kind={words.isDangerous ? 'danger' : 'primary'}
            control={control}
            label={words.label}
            onPress={submit}
          />
        </>
      }
    >
      <Form label={words.label} onSubmit={submit}>
        <Text>{words.text}</Text>
        <BoundTextArea control={control} name="reason" label="Reason" lines={3} maxLength={500} />
        <PasswordField
          control={control}
          name="currentPassword"
          label="Your own password"
          autoComplete="current-password"
        />
        <FormError control={control} title={words.failed} />
      </Form>
    </Dialog>
  );
}
