import { Quiet, Stack, Text } from '@/components/ui';
import type { CellPage, FailureRate as Rate } from '@/lib/contract/cells';
import { formatCount, formatNumber, formatRange } from '@/lib/units';

/** Banks that failed, per 100 bank-years: of the cell type, and of the pool beside it. */
export function FailureRate({ failures: { cellType, pool } }: { failures: CellPage['failures'] }) {
  if (!cellType && !pool) return null;
  return (
    <Stack gap="xs">
      {cellType && <Text>{`Failures: ${rateWords(cellType)}.`}</Text>}
      {pool && <Text>{`Over the whole pool: ${rateWords(pool)}.`}</Text>}
      <Quiet>
        A bank counts once, when a cell failed or swelled or a test was kept as a real failure. Banks that
        failed without a word are not in it, so the true rate is higher.
      </Quiet>
    </Stack>
  );
}

function rateWords({ failures, bankYears, banks, per100BankYears }: Rate): string {
  const { estimate, lower, upper } = per100BankYears;
  const rate = `${formatNumber(estimate, { decimals: 1 })} per 100 bank-years`;
  const range = `90 % range ${formatRange(lower, upper, { decimals: 1 })}`;
  const counted = `${formatCount(failures)} of ${formatCount(banks)} banks in ${formatCount(Math.round(bankYears))} bank-years`;
  return `${rate} (${range}; ${counted})`;
}
