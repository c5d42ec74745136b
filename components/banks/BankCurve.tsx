import { useState } from 'react';

import { GrowthChart, HistoryChart, type HistoryCheck } from '@/components/charts';
import { leftOutStates, plusMinusFraction } from '@/components/checks/checkWords';
import { Segmented, Text } from '@/components/ui';
import type { Check } from '@/lib/contract/checks';
import type { Standing } from '@/lib/contract/standing';
import { formatDate } from '@/lib/units';

import { StandingComputed } from './StandingComputed';

type Axis = 'years' | 'efc';

const axes: { value: Axis; label: string }[] = [
  { value: 'years', label: 'Years' },
  { value: 'efc', label: 'Full cycles' },
];

const points = (checks: readonly Check[], axis: Axis): HistoryCheck[] =>
  checks.map(({ id, computed, reading, state }) => ({
    id,
    x: axis === 'years' ? computed.ageYears : computed.efc,
    soh: computed.sohFraction,
    plusMinus: plusMinusFraction(computed),
    when: formatDate(reading.testedOn),
    isLeftOut: leftOutStates.has(state),
  }));

/** A bank's checks: on the lines of banks used like it where the pool can say, else alone. */
export function BankCurve({
  checks,
  standing,
}: {
  checks: readonly Check[];
  standing: Standing | undefined;
}) {
  const [axis, setAxis] = useState<Axis>('years');
  if (standing?.state !== 'ready')
    return (
      <HistoryChart
        title="Checks of this bank"
        checks={points(checks, 'years')}
        computed={
          <Text>
            Bars are ± at 95 % (k = 2) of what is new at each check; the meter&apos;s own error, the same at
            each of its checks, is not in them. Each check&apos;s page shows its own budget and formulas.
          </Text>
        }
      />
    );
  return (
    <GrowthChart
      title="Checks of this bank, among banks used like it"
      unit={axis}
      checks={points(checks, axis)}
      bands={standing.bands.flatMap(({ years, efc, quantiles, status }) =>
        status === 'beyond' ? [] : [{ x: axis === 'years' ? years : efc, quantiles, status }],
      )}
      controls={<Segmented label="Along" value={axis} onChange={setAxis} options={axes} />}
      computed={<StandingComputed standing={standing} />}
    />
  );
}
