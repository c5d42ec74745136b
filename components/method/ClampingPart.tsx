import { type Column, Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { FitInteraction, PublishedFitReport } from '@/lib/contract/fits';
import { formatCount, formatNumber, formatRange } from '@/lib/units';

const leverWords = {
  rate: (cut: number) => `rate above ${formatNumber(cut)} It`,
  depth: (cut: number) => `depth above ${formatNumber(cut * 100)} %`,
  heat: (cut: number) => `cells above ${formatNumber(cut)} °C`,
};

const balanceWords = {
  depthFraction: { label: 'depth, %', show: (value: number) => formatNumber(value * 100, { decimals: 0 }) },
  dischargeIt: { label: 'discharge rate, It', show: (value: number) => formatNumber(value, { decimals: 2 }) },
  temperatureC: {
    label: 'cell temperature, °C',
    show: (value: number) => formatNumber(value, { decimals: 1 }),
  },
  socMeanFraction: {
    label: 'mean charge level, %',
    show: (value: number) => formatNumber(value * 100, { decimals: 0 }),
  },
  ageYears: {
    label: 'age at the latest check, years',
    show: (value: number) => formatNumber(value, { decimals: 1 }),
  },
  efcPerYear: { label: 'full cycles a year', show: (value: number) => formatNumber(value, { decimals: 0 }) },
};

type BalanceRow = NonNullable<PublishedFitReport['balance']>[number];

const balanceColumns: Column<BalanceRow>[] = [
  { key: 'condition', title: 'Condition', cell: ({ condition }) => balanceWords[condition].label },
  {
    key: 'clamped',
    title: 'Clamped',
    figures: true,
    cell: ({ condition, clampedMean }) => balanceWords[condition].show(clampedMean),
  },
  {
    key: 'unclamped',
    title: 'Not clamped',
    figures: true,
    cell: ({ condition, unclampedMean }) => balanceWords[condition].show(unclampedMean),
  },
  {
    key: 'difference',
    title: 'Difference in sd',
    figures: true,
    cell: ({ standardisedDifference }) => formatNumber(standardisedDifference, { decimals: 2 }),
  },
  {
    key: 'words',
    title: 'in words',
    cell: ({ standardisedDifference }) =>
      Math.abs(standardisedDifference) > 0.25 ? 'they differ notably' : 'alike',
  },
];

const interactionColumns: Column<FitInteraction>[] = [
  { key: 'lever', title: 'Above', cell: ({ lever, cut }) => leverWords[lever](cut) },
  {
    key: 'estimate',
    title: 'Added to ln of cycling fade',
    figures: true,
    cell: ({ effect }) =>
      effect &&
      `${formatNumber(effect.estimate, { decimals: 2 })} ± ${formatNumber(effect.se, { decimals: 2 })}`,
  },
  {
    key: 'banks',
    title: 'Banks above, clamped and not',
    figures: true,
    cell: ({ effect }) =>
      effect && `${formatCount(effect.banks.clamped)}, ${formatCount(effect.banks.unclamped)}`,
  },
  {
    key: 'words',
    title: 'in words',
    cell: ({ effect }) =>
      !effect ? 'too few owners yet' : effect.isShown ? 'shown: more than 2 standard errors' : 'not shown',
  },
];

/** Clamping from other sides: without the model, with other stresses, and whether its banks are alike. */
export function ClampingPart({ fit: { matched, balance, interactions } }: { fit: PublishedFitReport }) {
  const shown = interactions.filter(({ effect }) => effect?.isShown).length;
  return (
    <Stack gap="m">
      <Heading>Clamping, from other sides</Heading>
      <Text>{matchedSentence(matched)}</Text>
      <Heading level={3}>Does clamping depend on another stress</Heading>
      <Text>{`One term was added at a time, at preset cuts: ${interactions.length} were tried, ${shown} shown.`}</Text>
      <Table
        caption="Clamping above a cut of another stress"
        columns={interactionColumns}
        rows={interactions}
        rowKey={({ lever }) => lever}
      />
      <Heading level={3}>Are clamped banks otherwise alike</Heading>
      {balance ? (
        <Table
          caption="Conditions of clamped and other banks"
          columns={balanceColumns}
          rows={balance}
          rowKey={({ condition }) => condition}
        />
      ) : (
        <Quiet>Too few owners clamp, or do not, to compare them.</Quiet>
      )}
    </Stack>
  );
}

function matchedSentence(matched: PublishedFitReport['matched']): string {
  if (!matched)
    return 'Too few owners clamp, or do not, under like conditions to compare them without the model.';
  const { capacityRatio, modelCapacityRatio, classes, banks } = matched;
  const points = (ratio: number) => (ratio - 1) * 100;
  const range = formatRange(points(capacityRatio.lower), points(capacityRatio.upper), {
    decimals: 1,
  }).replace('–', ' to ');
  return `Without the model, in ${formatCount(classes)} classes of like temperature, rate, depth and age, the capacity of ${formatCount(banks.clamped)} clamped banks lies ${aboveOrBelow(points(capacityRatio.estimate))} that of ${formatCount(banks.unclamped)} others (90 % range ${range} %). The model puts it ${aboveOrBelow(points(modelCapacityRatio))} over the same classes.`;
}

const aboveOrBelow = (value: number) =>
  `${formatNumber(Math.abs(value), { decimals: 1 })} % ${value < 0 ? 'below' : 'above'}`;
