import type { Transaction } from 'sequelize';

import type { BankFields } from '@/lib/contract/banks';

import { findChoosableCellType } from '../cellTypes/queries';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { latestCalendarDate } from '../latestCalendarDate';
import type { SignedInActor } from '../policies';

/**
 * What the schema can't know: the cell type is one that may be chosen, the bank is in use already.
 * @throws AppError invalid, with the fields
 */
export async function checkBankFields(
  { clock }: Deps,
  { userId }: SignedInActor,
  fields: BankFields,
  { keptCellTypeId }: { keptCellTypeId?: string },
  transaction: Transaction,
): Promise<void> {
  const problems: Record<string, string> = {};
  const isKept = fields.cellTypeId === keptCellTypeId;
  if (!isKept && !(await findChoosableCellType(fields.cellTypeId, userId, transaction)))
    problems.cellTypeId = 'Choose a cell type from the list.';
  if (fields.firstUseMonth > latestCalendarDate(clock()).slice(0, 7))
    problems.firstUseMonth = 'The first use lies in the future. Check the month.';
  if (Object.keys(problems).length > 0) throw new AppError('invalid', undefined, problems);
}
