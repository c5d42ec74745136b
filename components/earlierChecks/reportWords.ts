import type { EarlierReport, EarlierRow } from '@/lib/contract/earlierChecks';
import { formatCount } from '@/lib/units';

const counted = (count: number, one: string, many: string) =>
  `${formatCount(count)} ${count === 1 ? one : many}`;

/** "3 rows are good, 1 is there already, 2 have a problem." */
export function countsSentence({ counts: { good, there, problem }, isStored }: EarlierReport): string {
  const parts = [
    counted(good, isStored ? 'row is sent' : 'row is good', isStored ? 'rows are sent' : 'rows are good'),
    ...(there > 0 ? [counted(there, 'is there already', 'are there already')] : []),
    ...(problem > 0 ? [counted(problem, 'has a problem', 'have a problem')] : []),
  ];
  return `${parts.join(', ')}.`;
}

export const outcomeWords: Record<EarlierRow['outcome'], string> = {
  good: 'good',
  there: 'there already',
  problem: 'problem',
};

/** What is said of a row beside its figures: problems with their column, or what stands out. */
export function rowRemarks({ problems, remarks }: Pick<EarlierRow, 'problems' | 'remarks'>): string[] {
  return [
    ...problems.map(({ column, message }) => (column === null ? message : `${column}: ${message}`)),
    ...remarks,
  ];
}
