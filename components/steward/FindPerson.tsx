import { useAccountForm } from '@/components/account/useAccountForm';
import { BoundText, Form, FormError, SubmitButton } from '@/components/forms';
import { Heading, Quiet, Row, Stack } from '@/components/ui';
import { useFindPerson } from '@/lib/client/steward';
import { findPersonRequestSchema } from '@/lib/contract/steward';

import { PersonList } from './PersonList';

/** Looks one account up, to lock or unlock it. */
export function FindPerson() {
  const find = useFindPerson();
  const { control, submit } = useAccountForm(findPersonRequestSchema, { who: '' }, find.mutateAsync);
  const again = () => find.variables && find.mutate(find.variables);
  return (
    <Stack gap="m">
      <Heading>Find an account</Heading>
      <Form label="Find an account" onSubmit={submit}>
        <Stack gap="m" style={{ maxWidth: 480 }}>
          <BoundText
            control={control}
            name="who"
            label="E-mail address or account number"
            hint="The number is the one in the trail. An owner found by it keeps the address to themselves."
            inputMode="email"
            autoComplete="off"
            maxLength={254}
          />
          <FormError control={control} title="The account was not looked up" />
          <Row>
            <SubmitButton control={control} label="Find" onPress={submit} />
          </Row>
        </Stack>
      </Form>
      {find.data &&
        (find.data.person ? (
          <PersonList caption="Account found" people={[find.data.person]} onDone={again} />
        ) : (
          <Quiet role="status">No account goes by that.</Quiet>
        ))}
    </Stack>
  );
}
