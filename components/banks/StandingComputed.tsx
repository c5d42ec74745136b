import { Stack, Text } from '@/components/ui';
import type { Standing } from '@/lib/contract/standing';
import { formatInstant } from '@/lib/units';

/** How the growth chart, the standing and the forecast were computed. */
export function StandingComputed({ standing: { fittedAt, basis } }: { standing: Standing }) {
  return (
    <Stack gap="s">
      <Text>
        {`The lines hold 10, 25, 50, 75 and 90 % of ${basis === 'pool' ? 'banks of any cell type' : 'banks of this cell type'} at this bank's own conditions since new: parameters, starts and paces are integrated over, a meter's noise is not in them.`}
      </Text>
      <Text>
        Standing: each bank has a start c and a pace u, ln q = ln(calendar + cycling) + u. From this
        bank&apos;s approved checks follows what u can be; the share of banks that fade faster is 1 − Φ(u /
        σ), σ the spread of paces between banks. What the pool&apos;s own curve may be off counts as one more
        uncertainty.
      </Text>
      <Text>
        Forecast: the age by which ln q passes the level that leaves 80 %, over all starts and paces that
        agree with the checks, if the bank goes on as it was used to date. A sudden drop late in life is not
        modelled, and banks that stopped reporting may have done worse.
      </Text>
      <Text>
        Bars are ± at 95 % (k = 2) of what is new at each check; the meter&apos;s own error, the same at each
        of its checks, is not in them.
      </Text>
      {fittedAt && <Text tone="quiet">{`By the working fit of ${formatInstant(fittedAt)}.`}</Text>}
    </Stack>
  );
}
