import { type ReactNode } from 'react';
import { type Control, useFormState } from 'react-hook-form';

import { Form, FormError, SubmitButton, type ValidatedForm } from '@/components/forms';
import { ActionBar, Banner, Divider } from '@/components/ui';
import type { BankFields, CellTypeBrief } from '@/lib/contract/banks';

import { BankOptionalFields } from './BankOptionalFields';
import { BankRequiredFields } from './BankRequiredFields';
import type { BankFormValues } from './bankValues';

export type BankControl = Control<BankFormValues, unknown, BankFields>;

interface BankFormProps {
  form: ValidatedForm<BankFormValues, BankFields>;
  cellTypes: CellTypeBrief[];
  onSend: (bank: BankFields) => Promise<void>;
  /** What the button does. */
  label: string;
  /** Stands above the button in place of the server's refusal. */
  remark?: ReactNode;
}

/** The fields of a bank: required ones first, the others folded away in groups. */
export function BankForm({ form, cellTypes, onSend, label, remark }: BankFormProps) {
  const { control, handleSubmit } = form;
  const submit = handleSubmit(onSend);
  return (
    <Form label={label} onSubmit={submit}>
      <BankRequiredFields control={control} cellTypes={cellTypes} />
      <Divider />
      <BankOptionalFields control={control} />
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
