import { useAccountForm } from '@/components/account/useAccountForm';
import { BoundTextArea, Form, FormError, SubmitButton } from '@/components/forms';
import { Quiet, useToast } from '@/components/ui';
import { useMakeRelease } from '@/lib/client/releases';
import { makeReleaseSchema } from '@/lib/contract/releases';

/** Asks for what is new in a sentence, and makes the release. */
export function MakeReleaseForm({ number, isMaking }: { number: number; isMaking: boolean }) {
  const toast = useToast();
  const make = useMakeRelease();
  const { control, submit } = useAccountForm(makeReleaseSchema, { note: '' }, make.mutateAsync, (form) => {
    toast({ text: `Release ${number} is being made.` });
    form.reset();
  });
  if (isMaking)
    return <Quiet>{`Release ${number} is being made; this page shows it when it is there.`}</Quiet>;
  return (
    <Form label="Make the release" onSubmit={submit}>
      <BoundTextArea
        control={control}
        name="note"
        label="What is new, in a sentence"
        lines={3}
        maxLength={2000}
      />
      <FormError control={control} title="The release was not asked for" />
      <SubmitButton kind="primary" control={control} label={`Make release ${number}`} onPress={submit} />
    </Form>
  );
}
