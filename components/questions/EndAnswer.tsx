import { useMemo } from 'react';

import { Heading, Points, Quiet, ShareBar, Stack, Table, Text } from '@/components/ui';
import {
  calendarShareAt,
  lifeAt,
  type PublishedFit,
  type Ranged,
  type Use,
} from '@/lib/fit/pooled/published';
import { formatNumber, formatRange, noValue } from '@/lib/units';

import { commonCaveats } from './questionWords';

interface NamedUse {
  name: string;
  use: Use;
}

const cell = { dischargeIt: 0.1, temperatureC: 25, socMeanFraction: 0.5, isClamped: false };
const uses: readonly NamedUse[] = [
  { name: 'Backup only: 60 % deep, once a month', use: { ...cell, depthFraction: 0.6, efcPerYear: 7 } },
  { name: 'Weekends: 60 % deep, twice a week', use: { ...cell, depthFraction: 0.6, efcPerYear: 62 } },
  { name: 'Every day, 30 % deep', use: { ...cell, depthFraction: 0.3, efcPerYear: 110 } },
  { name: 'Every day, 60 % deep', use: { ...cell, depthFraction: 0.6, efcPerYear: 219 } },
  { name: 'Every day, 90 % deep', use: { ...cell, depthFraction: 0.9, efcPerYear: 329 } },
  {
    name: 'Every day, 90 % deep, at 0.5 It',
    use: { ...cell, depthFraction: 0.9, efcPerYear: 329, dischargeIt: 0.5 },
  },
];

interface EndRow extends NamedUse {
  share: Ranged;
  years: string;
}

/** Which part of the fade takes more, use by use. */
export function EndAnswer({ fit }: { fit: PublishedFit }) {
  const rows = useMemo(() => uses.map((one) => rowOf(fit, one)), [fit]);
  return (
    <Stack gap="xl">
      <Stack gap="m">
        <Text size="lead">{endConclusion(rows)}</Text>
        <Text>
          The part of the fade that time takes by the end of the readings, at each use; the rest is cycling’s.
          Cells near 25 °C, half full on average, 0.1 It unless said.
        </Text>
        {rows.map(({ name, share }) => (
          <Stack key={name} gap="xs">
            <Text>{name}</Text>
            <ShareBar
              parts={[
                { label: 'time', fraction: share.estimate },
                { label: 'cycles', fraction: 1 - share.estimate },
              ]}
              summary={`${name}: time ${shareWords(share)} of the fade, cycles the rest.`}
            />
            <Quiet>{`Time ${shareWords(share)}, cycles the rest: ${verdictOf(share)}.`}</Quiet>
          </Stack>
        ))}
        <Table
          caption="Which takes more"
          showCaption
          rows={rows}
          rowKey={({ name }) => name}
          columns={[
            { key: 'use', title: 'Use', cell: ({ name }) => name },
            { key: 'share', title: 'Time’s part', figures: true, cell: ({ share }) => shareWords(share) },
            { key: 'verdict', title: 'in words', cell: ({ share }) => verdictOf(share) },
            { key: 'years', title: 'Years to 80 %', figures: true, cell: ({ years }) => years },
          ]}
        />
      </Stack>
      <Stack gap="s">
        <Heading>What could mislead</Heading>
        <Points
          points={[
            'Time and cycles come together in every bank: the pool tells them apart only as far as banks of one age have gone through different numbers of cycles.',
            ...commonCaveats,
          ]}
        />
      </Stack>
    </Stack>
  );
}

function rowOf(fit: PublishedFit, named: NamedUse): EndRow {
  const life = lifeAt(fit, named.use);
  const years =
    life.status === 'beyond' ? noValue : formatRange(life.years.lower, life.years.upper, { decimals: 0 });
  return { ...named, share: calendarShareAt(fit, named.use, fit.reach.years), years };
}

const shareWords = ({ estimate, lower, upper }: Ranged) =>
  `${formatNumber(estimate * 100, { decimals: 0 })} % (${formatRange(lower * 100, upper * 100, { decimals: 0 })})`;

/** What a share's range says: one takes more, or it can't be told. */
export function verdictOf({ lower, upper }: Pick<Ranged, 'lower' | 'upper'>): string {
  if (lower > 0.5) return 'time takes more';
  return upper < 0.5 ? 'cycles take more' : 'could be either';
}

function endConclusion(rows: readonly EndRow[]): string {
  const byTime = rows.filter(({ share }) => share.lower > 0.5).length;
  const byCycles = rows.filter(({ share }) => share.upper < 0.5).length;
  if (byTime === rows.length) return 'Time takes more than cycles do, at every use below.';
  if (byCycles === rows.length) return 'Cycles take more than time does, at every use below.';
  if (byTime > 0 && byCycles > 0)
    return 'It depends on the use: a bank that rests is ended by time, one that is worked hard by its cycles.';
  if (byTime > 0) return 'Time takes more at gentle uses; at hard ones it can’t be told yet.';
  return byCycles > 0
    ? 'Cycles take more at hard uses; at gentle ones it can’t be told yet.'
    : 'It can’t be told yet: at every use below either could take more.';
}
