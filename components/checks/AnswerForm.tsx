import { useForm } from 'react-hook-form';
import { zodResolver } from '@hookform/resolvers/zod';
import { z } from 'zod';

import {
  BoundTextArea,
  Form,
  FormError,
  SubmitButton,
  useLocalDraft,
  useServerErrors,
} from '@/components/forms';
import { Banner, ButtonLink, Row, Stack, Text, useToast } from '@/components/ui';
import { useAnswerQuestion } from '@/lib/client/checks';
import { useSession } from '@/lib/client/session';
import { answerRequestSchema, type Check } from '@/lib/contract/checks';
import { limits } from '@/lib/contract/limits';
import { formatDate } from '@/lib/units';

import { openQuestion } from './checkWords';

const answerSchema = z.object({ answer: answerRequestSchema.shape.answer });

/** A moderator's question with the box for its answer, and the way to correct the figures instead. */
export function AnswerForm({ check }: { check: Check }) {
  const { user } = useSession();
  const toast = useToast();
  const answerQuestion = useAnswerQuestion(check.id);
  const form = useForm({
    resolver: zodResolver(answerSchema),
    mode: 'onTouched',
    defaultValues: { answer: '' },
  });
  const draft = useLocalDraft(user && `${user.id}/answer/${check.id}`, form);
  const showErrors = useServerErrors(form);

  const send = form.handleSubmit(async ({ answer }) => {
    try {
      await answerQuestion.mutateAsync({ version: check.version, answer });
      draft.clear();
      toast({ text: 'Your answer is sent.' });
    } catch (error) {
      showErrors(error);
    }
  });

  return (
    <Banner
      kind="caution"
      title={`A moderator asks about the check of ${formatDate(check.reading.testedOn)}`}
    >
      <Stack gap="m">
        <Text>{openQuestion(check)}</Text>
        <Form label="Answer the moderator" onSubmit={send}>
          <BoundTextArea
            control={form.control}
            name="answer"
            label="Your answer"
            hint="Moderators see five characters for your bank, and never who you are."
            maxLength={limits.noteLength.max}
          />
          <FormError control={form.control} />
          <Row>
            <SubmitButton control={form.control} label="Send the answer" onPress={send} />
            <ButtonLink
              href={{
                pathname: '/banks/[bankId]/check',
                params: { bankId: check.bankId, correct: check.id },
              }}
              label="Correct the figures"
            />
          </Row>
        </Form>
      </Stack>
    </Banner>
  );
}
