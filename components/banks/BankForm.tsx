import type { ComponentType, ReactNode } from 'react';
import { useFormState } from 'react-hook-form';

import { Form, FormError, SubmitButton } from '@/components/forms';
import { ActionBar, Banner, Divider, Heading, Stack } from '@/components/ui';
import type { BankFields } from '@/lib/contract/banks';

import type { BankControl, BankFieldsProps } from './bankFormTypes';
import { bankSteps } from './bankSteps';
import { CellsFields } from './CellsFields';
import { ClampingFields } from './ClampingFields';
import { LayoutFields } from './LayoutFields';
import { StartFields } from './StartFields';
import { UseFields } from './UseFields';

/** The fields of each step but the last, which asks nothing. */
export const stepFields: readonly ComponentType<BankFieldsProps>[] = [
  CellsFields,
  LayoutFields,
  ClampingFields,
  UseFields,
  StartFields,
];

interface BankFormProps extends BankFieldsProps {
  onSend: (bank: BankFields) => Promise<void>;
  /** What the button does. */
  label: string;
  /** Stands above the button in place of the server's refusal. */
  remark?: ReactNode;
}

/** All fields of a bank on one page, in the groups they were first asked in. */
export function BankForm({ form, cellTypes, onSend, label, remark }: BankFormProps) {
  const { control, handleSubmit } = form;
  const submit = handleSubmit(onSend);
  return (
    <Form label={label} onSubmit={submit}>
      {stepFields.map((Fields, step) => (
        <Stack key={step} gap="l">
          {step > 0 && <Divider />}
          <Heading>{bankSteps[step]?.title}</Heading>
          <Fields form={form} cellTypes={cellTypes} />
        </Stack>
      ))}
      <WrongFields control={control} />
      {remark ?? <FormError control={control} />}
      <ActionBar>
        <SubmitButton control={control} label={label} onPress={submit} wide />
      </ActionBar>
    </Form>
  );
}

/** After a try to send: how many fields hold it up. The first of them has the focus. */
function WrongFields({ control }: { control: BankControl }) {
  const { errors, submitCount } = useFormState({ control });
  const count = Object.keys(errors).filter((name) => name !== 'root').length;
  if (submitCount === 0 || count === 0) return null;
  return (
    <Banner kind="error" title="Not sent yet">
      {count === 1
        ? 'One field needs another look. Its message stands beside it.'
        : `${count} fields need another look. Their messages stand beside them.`}
    </Banner>
  );
}
