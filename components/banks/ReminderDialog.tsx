import { useWatch } from 'react-hook-form';
import { z } from 'zod';

import {
  BoundDate,
  BoundRadio,
  chosen,
  Form,
  FormError,
  SubmitButton,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Button, Dialog, type Option, useToast } from '@/components/ui';
import { useSetReminder } from '@/lib/client/reminders';
import { calendarDateSchema } from '@/lib/contract/fields';
import type { Reminder, SetReminderRequest } from '@/lib/contract/reminders';
import { addMonths, calendarDateOf } from '@/lib/units';

type When = 'yearly' | 'day' | 'off';

const choices: readonly Option[] = [
  { value: 'yearly', label: 'A year after the last check' },
  { value: 'day', label: 'On a day I choose', hint: 'For the next check only; then yearly again.' },
  { value: 'off', label: 'Do not remind me of this bank' },
] satisfies readonly Option<When>[];
const farthestMonths = 60;

const reminderForm = z
  .object({ when: chosen(z.enum(['yearly', 'day', 'off'])), dueOn: z.string() })
  .superRefine(({ when, dueOn }, context) => {
    if (when !== 'day') return;
    const message =
      dueOn === '' ? 'This is needed.' : calendarDateSchema.safeParse(dueOn).error?.issues[0]?.message;
    if (message) context.addIssue({ code: 'custom', path: ['dueOn'], message });
  })
  .transform(({ when, dueOn }): SetReminderRequest => {
    return { isOn: when !== 'off', dueOn: when === 'day' ? dueOn : null };
  });

interface ReminderDialogProps {
  reminder: Reminder;
  onClose: () => void;
}

/** Chooses when the owner is reminded of a bank's next check. */
export function ReminderDialog({ reminder, onClose }: ReminderDialogProps) {
  const toast = useToast();
  const setReminder = useSetReminder(reminder.bankId);
  const form = useValidatedForm(reminderForm, {
    when: !reminder.isOn ? 'off' : reminder.ownDueOn === null ? 'yearly' : 'day',
    dueOn: reminder.ownDueOn ?? '',
  });
  const showErrors = useServerErrors(form);
  const { control } = form;
  const when = useWatch({ control, name: 'when' });
  const today = calendarDateOf(new Date(), 'local');

  const send = form.handleSubmit(async (request) => {
    try {
      await setReminder.mutateAsync(request);
      toast({ text: request.isOn ? 'The day is kept.' : 'No reminder is mailed for this bank.' });
      onClose();
    } catch (error) {
      showErrors(error);
    }
  });
  const submit = () => void send();

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Remind me of the next check"
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <SubmitButton control={control} label="Keep it" onPress={submit} />
        </>
      }
    >
      <Form label="Remind me of the next check" onSubmit={submit}>
        <BoundRadio control={control} name="when" label="When" options={choices} />
        {when === 'day' && (
          <BoundDate
            control={control}
            name="dueOn"
            label="Day"
            hint="Within the next five years."
            min={today}
            max={addMonths(today, farthestMonths)}
          />
        )}
        <FormError control={control} title="The choice was not kept" />
      </Form>
    </Dialog>
  );
}
