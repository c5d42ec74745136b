import { BinChart } from '@/components/charts';
import { Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { PublishedFitReport } from '@/lib/contract/fits';
import { formatCount, formatNumber, formatPercent } from '@/lib/units';

import { pointOf } from './fitWords';

/** Predicted against measured, and how often predicted ranges hold the checks. */
export function CoveragePart({ fit: { coverage, predicted } }: { fit: PublishedFitReport }) {
  const series = [{ label: 'checks', mark: 'circle' as const, points: predicted.map(pointOf) }];
  return (
    <Stack gap="m">
      <Heading>Predicted against measured</Heading>
      <Text>
        Each check is predicted from the other checks of its bank and the pool, without its own reading, with
        a range. A model that knows its doubt holds as many checks in a range as the range says.
      </Text>
      <Table
        caption="How often predicted ranges hold the checks"
        rows={coverage.within}
        rowKey={({ level }) => String(level)}
        columns={[
          { key: 'level', title: 'Range', cell: ({ level }) => formatPercent(level) },
          {
            key: 'share',
            title: 'Checks inside it',
            figures: true,
            cell: ({ shareFraction }) => formatPercent(shareFraction, 1),
          },
        ]}
      />
      <Quiet>{`Over ${formatCount(coverage.checks)} checks; those that the screen set aside are not among them.`}</Quiet>
      <BinChart
        title="Measured capacity where it was predicted"
        hasHeading
        series={series}
        xName="predicted capacity left"
        unitX="%"
        formatX={(value) => formatNumber(value * 100, { decimals: 0 })}
        yTitle="measured capacity left, % of rated: median and middle 80 %"
        yTitleShort="measured capacity left, %"
        reference="same"
        finding="On the line, what was measured is what was predicted."
      />
    </Stack>
  );
}
