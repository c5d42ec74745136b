import { useWatch } from 'react-hook-form';
import { z } from 'zod';

import {
  BoundDate,
  BoundSelect,
  BoundTextArea,
  chosen,
  Form,
  FormError,
  SubmitButton,
  useLocalDraft,
  useServerErrors,
  useValidatedForm,
} from '@/components/forms';
import { Banner, Button, Dialog, type Option, useToast } from '@/components/ui';
import { useAddBankEvent } from '@/lib/client/banks';
import { useSession } from '@/lib/client/session';
import { type Bank, type BankEventInput, createBankEventRequestSchema } from '@/lib/contract/banks';
import { limits } from '@/lib/contract/limits';
import { calendarDateOf } from '@/lib/units';

import { bankEventWords, optionsOf } from './bankWords';

const { shape } = createBankEventRequestSchema;
const eventSchema = z.object({
  happenedOn: z.string().min(1, 'This is needed.').pipe(shape.happenedOn),
  kind: chosen(shape.kind),
  note: z.string().pipe(shape.note.unwrap()),
});
const kinds: Option[] = optionsOf(bankEventWords);

interface EventValues {
  happenedOn: string;
  kind: string;
  note: string;
}

const swollen = {
  title: 'A swollen cell means stop',
  text: "Take the bank out of use. The cell is never pressed flat, charged or tested on. The maker's instructions and local codes come first.",
};

const handsOn = {
  title: 'Before you work on it',
  text: 'Disconnect it, insulated tools, no jewellery, eye protection: a bank drives very high currents into a short circuit. Bring cells to equal voltage before they are put in parallel.',
};

/** Kinds of event that mean hands on the bank, or that it must be left alone. */
const dangers: Partial<Record<string, { title: string; text: string }>> = {
  swollen,
  cellFailed: handsOn,
  cellReplaced: handsOn,
  rebalanced: handsOn,
  clampingChanged: handsOn,
  layoutChanged: handsOn,
};

const nothing: EventValues = { happenedOn: '', kind: '', note: '' };

/** Notes something that happened to a bank. */
export function AddEventDialog({ bank, onClose }: { bank: Bank; onClose: () => void }) {
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
        <BoundTextArea
          control={control}
          name="note"
          label="Note"
          hint="Which cell, why, what was done. For moderators; never published."
          maxLength={limits.noteLength.max}
          optional
        />
        <FormError control={control} />
      </Form>
    </Dialog>
  );
}
