import { Heading, Quiet, Stack, Text } from '@/components/ui';
import { formatCount, formatDate, formatNumber, minusSign } from '@/lib/units';

import { plusMinusFraction, sohLine } from './checkWords';
import type { ComputedCase } from './computedCase';

/** This check beside the one before: shown only once everything has been entered. */
export function Comparison({ computedCase: { computed, previous } }: { computedCase: ComputedCase }) {
  if (!previous)
    return (
      <Stack gap="s">
        <Heading size="lead">Beside the check before</Heading>
        <Quiet>This is the first check of the bank. Its curve starts here.</Quiet>
      </Stack>
    );
  const change = (computed.sohFraction - previous.computed.sohFraction) * 100;
  const margin = Math.hypot(plusMinusFraction(computed), plusMinusFraction(previous.computed)) * 100;
  const sign = change < 0 ? minusSign : '+';
  const points = `${sign}${formatNumber(Math.abs(change), { decimals: 1 })} ± ${formatNumber(margin, { decimals: 1 })} points`;
  return (
    <Stack gap="s">
      <Heading size="lead">Beside the check before</Heading>
      <Text>
        {`${formatDate(previous.reading.testedOn)}: ${sohLine(previous.computed)}. Now ${points} of the rated capacity.`}
      </Text>
      <Quiet>{changeSentence(change, margin)}</Quiet>
      <CounterLine computed={computed} previous={previous} />
    </Stack>
  );
}

function CounterLine({
  computed,
  previous,
}: Pick<ComputedCase, 'computed'> & { previous: NonNullable<ComputedCase['previous']> }) {
  const added = computed.efc - previous.computed.efc;
  if (added < 0)
    return (
      <Text tone="rust">
        {`The counter stands ${formatCount(-added)} full cycles below the check before. Was it reset, or is it of another unit?`}
      </Text>
    );
  return <Quiet>{`${formatCount(added)} full cycles since then.`}</Quiet>;
}

function changeSentence(change: number, margin: number): string {
  if (Math.abs(change) <= margin) return 'Within what the two uncertainties allow: no change is shown.';
  if (change > 0)
    return 'A rise. After a rebalance or a replaced cell that is no mistake; note it as an event of the bank.';
  return 'A fall beyond the two uncertainties.';
}
