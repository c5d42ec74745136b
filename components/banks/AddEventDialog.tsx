import { useWatch } from 'react-hook-form';
import { z } from 'zod';

import {
  BoundDate,
  BoundSelect,
  BoundTextArea,
  chosen,
  Form,
  FormError,
  readBy,
  SubmitButton,
  useLocalDraft,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Banner, Button, Dialog, type Option, Quiet, useToast } from '@/components/ui';
import { useAddBankEvent } from '@/lib/client/banks';
import { useSession } from '@/lib/client/session';
import { type Bank, type BankEventInput, createBankEventRequestSchema, endingOf } from '@/lib/contract/banks';
import { limits } from '@/lib/contract/limits';
import { calendarDateOf } from '@/lib/units';

import { dangers } from './bankDangers';
import { bankEventWords, optionsOf } from './bankWords';

const { shape } = createBankEventRequestSchema;
const eventSchema = z
  .object({
    happenedOn: z.string().min(1, 'This is needed.').pipe(shape.happenedOn),
    kind: chosen(shape.kind),
    note: z.string().pipe(shape.note.unwrap()),
  })
  .transform(readBy(createBankEventRequestSchema));
const kinds: Option[] = optionsOf(bankEventWords);

interface EventValues {
  happenedOn: string;
  kind: string;
  note: string;
}

const nothing: EventValues = { happenedOn: '', kind: '', note: '' };

interface AddEventDialogProps {
  bank: Bank;
  onClose: () => void;
  /** What was noted ends the bank. */
  onEnded: () => void;
}

/** Notes something that happened to a bank. */
export function AddEventDialog({ bank, onClose, onEnded }: AddEventDialogProps) {
  const { user } = useSession();
  const toast = useToast();
  const addEvent = useAddBankEvent(bank.id);
  const form = useValidatedForm<EventValues, BankEventInput>(eventSchema, nothing);
  const draft = useLocalDraft(user && `${user.id}/event/${bank.id}`, form);
  const showErrors = useServerErrors(form);
  const { control } = form;
  const kind = useWatch({ control, name: 'kind' });

  const send = form.handleSubmit(async (event) => {
    try {
      await addEvent.mutateAsync(event);
      draft.clear();
      toast({ text: 'The event is noted.' });
      onClose();
      if (endingOf([event])) onEnded();
    } catch (error) {
      showErrors(error);
    }
  });

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Add an event"
      actions={
        <>
          <Button label="Not now" onPress={onClose} />
          <SubmitButton control={control} label="Add the event" onPress={send} />
        </>
      }
    >
      <Form label="Add an event" onSubmit={send}>
        <BoundSelect control={control} name="kind" label="What happened" options={kinds} />
        {dangers[kind] && (
          <Banner kind="caution" title={dangers[kind].title}>
            {dangers[kind].text}
          </Banner>
        )}
        <BoundDate
          control={control}
          name="happenedOn"
          label="Day"
          min={`${bank.firstUseMonth}-01`}
          max={calendarDateOf(new Date(), 'local')}
        />
        {endingOf([{ kind }]) && (
          <Quiet>
            With this the bank ends: no further check is asked for and no reminder is mailed. What was
            measured stays and counts.
          </Quiet>
        )}
        <BoundTextArea
          control={control}
          name="note"
          label={kind === 'retired' ? 'Why it was retired' : 'Note'}
          hint={
            kind === 'retired'
              ? 'Worn out, failed, or only replaced: each counts. For moderators; never published.'
              : 'Which cell, why, what was done. For moderators; never published.'
          }
          maxLength={limits.noteLength.max}
          optional={kind !== 'retired'}
        />
        <FormError control={control} />
      </Form>
    </Dialog>
  );
}
