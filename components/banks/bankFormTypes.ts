import type { Control } from 'react-hook-form';

import type { ValidatedForm } from '@/components/forms';
import type { BankFields, CellTypeChoice } from '@/lib/contract/banks';

import type { BankFormValues } from './bankValues';

export type BankFormHandle = ValidatedForm<BankFormValues, BankFields>;
export type BankControl = Control<BankFormValues, unknown, BankFields>;

/** What every group of a bank's fields is given. */
export interface BankFieldsProps {
  form: BankFormHandle;
  cellTypes: CellTypeChoice[];
}
