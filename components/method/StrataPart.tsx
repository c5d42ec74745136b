import { useState } from 'react';

import { BinChart } from '@/components/charts';
import { Heading, Quiet, SelectField, Stack, Text } from '@/components/ui';
import { leastOf } from '@/lib/contract/counts';
import type { PublishedFitReport } from '@/lib/contract/fits';
import { formatNumber } from '@/lib/units';

import { pointOf } from './fitWords';

/** Raw capacities in classes of heat and rate, clamped and not, beside the model at the mean use of each class. */
export function StrataPart({ fit: { strata } }: { fit: PublishedFitReport }) {
  const classes = [...new Set(strata.map(classOf))];
  const [chosen, setChosen] = useState('');
  const shown = classes.includes(chosen) ? chosen : fullest(strata);
  const series = strata
    .filter((stratum) => classOf(stratum) === shown)
    .map(({ isClamped, bins }) => ({
      label: isClamped ? 'clamped' : 'not clamped',
      mark: isClamped ? ('square' as const) : ('circle' as const),
      points: bins.map(pointOf),
    }));
  return (
    <Stack gap="m">
      <Heading>The readings themselves</Heading>
      <Text>
        Capacities as they were measured, per year of age, in classes of temperature and rate. Open circles
        are banks that are not clamped, filled squares clamped ones; the lines are the model at the mean use
        of each.
      </Text>
      {shown === undefined ? (
        <Quiet>No class has at least 5 owners in a year yet.</Quiet>
      ) : (
        <BinChart
          title={`Capacity by age: ${shown}`}
          series={series}
          xName="age"
          unitX="years"
          formatX={(value) => formatNumber(value)}
          yTitle="capacity left, % of rated: median and middle 80 %"
          yTitleShort="capacity left, % of rated"
          finding={`${series.length > 1 ? 'Clamped and not side by side' : `Only ${series[0]?.label ?? 'few'} banks`}, ${shown}.`}
          controls={
            <SelectField
              label="Cell temperature and rate"
              value={shown}
              options={classes.map((one) => ({ value: one, label: one }))}
              onChange={setChosen}
            />
          }
        />
      )}
    </Stack>
  );
}

/** "18 to 28 °C, 0.15 to 0.3 It" */
const classOf = ({ heat, rate }: PublishedFitReport['strata'][number]) =>
  `${heat.replace('cells ', '')}, ${rate.replace('discharge ', '')}`;

/** The class with the most checks, shown first. */
function fullest(strata: PublishedFitReport['strata']): string | undefined {
  const counts = new Map<string, number>();
  for (const stratum of strata) {
    const key = classOf(stratum);
    counts.set(
      key,
      (counts.get(key) ?? 0) + stratum.bins.reduce((sum, { evidence }) => sum + leastOf(evidence.checks), 0),
    );
  }
  return [...counts].sort(([, a], [, b]) => b - a)[0]?.[0];
}
