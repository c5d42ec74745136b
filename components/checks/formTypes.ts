import type { Control } from 'react-hook-form';

import type { ValidatedForm } from '@/components/forms';
import type { Bank } from '@/lib/contract/banks';

import type { ReadCheck } from './checkSchema';
import type { CheckFormValues } from './checkValues';

export type CheckFormHandle = ValidatedForm<CheckFormValues, ReadCheck>;
export type CheckControl = Control<CheckFormValues, unknown, ReadCheck>;

export interface StepProps {
  form: CheckFormHandle;
  bank: Bank;
}
