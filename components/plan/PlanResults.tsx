import { DefinitionList, Readout, Readouts, Stack, Text } from '@/components/ui';
import { outsideSentence } from '@/components/cells/lifeWords';
import type { PlanResult } from '@/lib/plan';
import { formatNumber, formatQuantity, formatRange, noValue } from '@/lib/units';

import {
  aloneWords,
  breakEvenWords,
  costRange,
  depthWords,
  lifeSentence,
  moneyRange,
  pricePerKwh,
  rangedWords,
  shortWords,
  wholeMoney,
} from './planWords';

interface PlanPartProps {
  plan: PlanResult;
  currency: string;
}

/** Whether the pool reaches the plan's use and says enough of it for figures. */
export const isTold = ({ life, outside }: PlanResult): boolean =>
  life.support !== 'notMeasured' && outside.length === 0;

/** The answer of a plan: how long, and at what price. */
export function PlanAnswer({ plan, currency }: PlanPartProps) {
  const hasFigures = isTold(plan);
  return (
    <Stack gap="m">
      <Readouts>
        <Readout
          value={hasFigures ? yearsValue(plan) : noValue}
          unit="years"
          tone={plan.life.status === 'measured' ? 'ink' : 'tide'}
        >
          {hasFigures ? lifeSentence(plan) : 'No figure at this use.'}
        </Readout>
        <Readout
          value={hasFigures ? pricePerKwh(plan.costMinorPerKwh.estimate, currency) : noValue}
          unit="/kWh"
          tone="tide"
        >
          {plan.isCapped ? 'Cost per kWh delivered, at most.' : 'Cost per kWh delivered.'}
        </Readout>
      </Readouts>
      {plan.outside.length > 0 && <Text>{outsideSentence(plan.outside)}</Text>}
      {plan.life.support === 'notMeasured' && (
        <Text>Not measured yet at this use: more than half of it would come from published studies.</Text>
      )}
    </Stack>
  );
}

/** The estimate; past what is projected its range alone. */
function yearsValue({ years, isCapped, life }: PlanResult): string {
  if (isCapped) return `over ${formatNumber(years.estimate, { decimals: 0 })}`;
  return life.status === 'extrapolated'
    ? formatRange(years.lower, years.upper, { decimals: 0 })
    : formatNumber(years.estimate, { decimals: 0 });
}

/** What is in the answer, row by row. */
export function PlanDetails({ plan, currency }: PlanPartProps) {
  return <DefinitionList figures items={detailsOf(plan, currency)} />;
}

/** Every output of a plan with its range, as label and words; the comparison of two plans shows the same rows. */
export function detailsOf(plan: PlanResult, currency: string): { label: string; value: string }[] {
  const it = (value: number) => formatQuantity(value, 'It', { decimals: 2 });
  const over = plan.isCapped ? 'over ' : '';
  return [
    { label: 'Life', value: `${over}${rangedWords(plan.years, 0)} years` },
    { label: 'By cycles alone', value: aloneWords(plan.cyclingYears) },
    { label: 'By time alone', value: aloneWords(plan.calendarYears) },
    { label: 'Depth of a night', value: depthWords(plan) },
    { label: 'Rate', value: `${it(plan.first.dischargeIt)}, at most ${it(plan.first.peakIt)}` },
    { label: 'The night’s energy', value: shortWords(plan) },
    { label: 'Delivered', value: `${over}${formatKwh(plan.deliveredKwh)} kWh` },
    { label: 'First cost', value: wholeMoney(plan.firstCostMinor, currency) },
    { label: 'Per kWh delivered', value: costRange(plan.costMinorPerKwh, currency) },
    { label: 'Net gain', value: moneyRange(plan.gainMinor, currency) },
    { label: 'Paid back after', value: breakEvenWords(plan) },
  ];
}

function formatKwh({ estimate, lower, upper }: PlanResult['deliveredKwh']): string {
  const hundreds = (value: number) => Math.round(value / 100) * 100;
  return rangedWords({ estimate: hundreds(estimate), lower: hundreds(lower), upper: hundreds(upper) }, 0);
}
