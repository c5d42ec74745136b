import { StyleSheet, View } from 'react-native';

import { color, space, useLayout } from '@/components/theme';
import { Figure, type GaugeScale, Link, Quiet, RangeBar, Text } from '@/components/ui';
import type { CellEntry } from '@/lib/contract/cells';
import { formatQuantity } from '@/lib/units';

import { listColumns } from './listColumns';
import { carriedClaims } from './cellWords';
import { lifeFigure, lifeSummary, reachWords, standingWords, toldOf } from './lifeWords';
import { absenceWords } from './poolWords';

interface LifetimeRowProps {
  entry: CellEntry;
  scale: GaugeScale;
}

/** One cell type of the list: its life on the shared scale, or why it has none yet. */
export function LifetimeRow({ entry, scale }: LifetimeRowProps) {
  const { isWide } = useLayout();
  const parts = {
    name: <Name entry={entry} />,
    value: <LifeValue entry={entry} />,
    gauge: <Gauge entry={entry} scale={scale} />,
    reach: entry.life && <Quiet>{reachWords(entry.evidence, entry.life)}</Quiet>,
    status: entry.life && <Quiet>{standingWords(entry.life)}</Quiet>,
  };
  if (isWide)
    return (
      <View role="listitem" style={[styles.row, styles.wide]}>
        <View style={listColumns.name}>
          {parts.name}
          {parts.reach}
        </View>
        <View style={listColumns.gauge}>{parts.gauge}</View>
        <View style={listColumns.value}>
          {parts.value}
          {parts.status}
        </View>
      </View>
    );
  return (
    <View role="listitem" style={styles.row}>
      <View style={styles.line}>
        {parts.name}
        {parts.value}
      </View>
      {parts.gauge}
      <View style={styles.line}>
        {parts.reach}
        {parts.status}
      </View>
    </View>
  );
}

function Name({ entry: { cellType } }: { entry: CellEntry }) {
  return (
    <Text style={styles.shrink}>
      <Link
        href={{ pathname: '/cells/[cellId]', params: { cellId: cellType.id } }}
        size="lead"
        tone="ink"
        strong
        bare
      >
        {cellType.name}
      </Link>
      <Quiet>{`  ${formatQuantity(cellType.ratedAh, 'Ah', { decimals: 0 })}`}</Quiet>
    </Text>
  );
}

function Gauge({ entry: { cellType, life, claims }, scale }: LifetimeRowProps) {
  if (!life) return null;
  const quoted = carriedClaims(claims)[0]?.label.impliedYears.estimate;
  const told = toldOf(life);
  const hasFigure = told === 'figure' || told === 'range';
  return (
    <RangeBar
      scale={scale}
      summary={`${cellType.name}: ${lifeSummary(life, quoted)}`}
      banks={hasFigure && life.rangeOfBanks ? [life.rangeOfBanks.lower, life.rangeOfBanks.upper] : undefined}
      interval={hasFigure ? [life.years.lower, life.years.upper] : undefined}
      estimate={hasFigure ? life.years.estimate : undefined}
      quoted={quoted}
      status={told === 'figure' ? 'projected' : 'extrapolated'}
      isOfAll={life.basis === 'pool'}
    />
  );
}

function LifeValue({ entry: { life, absence } }: { entry: CellEntry }) {
  if (!life) return <Quiet>{absenceWords[absence ?? 'noFit'].short}</Quiet>;
  const { value, range } = lifeFigure(life);
  if (value === '–') return <Quiet>no figure</Quiet>;
  const isOwn = life.basis !== 'pool';
  return (
    <Text>
      <Figure size="lead" strong={isOwn} tone={isOwn ? 'ink' : 'quiet'}>
        {value}
      </Figure>
      {range !== '' && <Figure tone="quiet">{` (${range})`}</Figure>}
      <Text weight={isOwn ? 'strong' : 'regular'} tone={isOwn ? 'ink' : 'quiet'}>
        {' y'}
      </Text>
    </Text>
  );
}

const styles = StyleSheet.create({
  row: { paddingVertical: space.l, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  wide: { flexDirection: 'row', alignItems: 'center', gap: space.xl, paddingVertical: space.m },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.m },
  shrink: { flexShrink: 1, minWidth: 0 },
});
