import { StyleSheet, View } from 'react-native';

import { color, space, useLayout } from '@/components/theme';
import { Figure, type GaugeScale, Link, Quiet, RangeBar, Text } from '@/components/ui';
import type { CellEntry, Use } from '@/lib/contract/cells';
import { formatQuantity } from '@/lib/units';

import { listColumns } from './listColumns';
import { absenceWords, lifeFigure, lifeSummary, reachWords } from './poolWords';
import { quotedYears } from './quotedLife';

interface LifetimeRowProps {
  entry: CellEntry;
  use: Use;
  scale: GaugeScale;
}

/** One cell type of the list: its life on the shared scale, or why it has none yet. */
export function LifetimeRow({ entry, use, scale }: LifetimeRowProps) {
  const { isWide } = useLayout();
  const parts = {
    name: <Name entry={entry} />,
    value: <LifeValue entry={entry} />,
    gauge: <Gauge entry={entry} use={use} scale={scale} />,
    reach: entry.life && entry.evidence && <Quiet>{reachWords(entry.evidence, entry.life)}</Quiet>,
    status: entry.life && <Quiet>{statusWords(entry.life.status)}</Quiet>,
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

function Gauge({ entry: { cellType, life, claims }, use, scale }: LifetimeRowProps) {
  if (!life) return null;
  const quoted = claims[0] && quotedYears(claims[0], use);
  return (
    <RangeBar
      scale={scale}
      summary={`${cellType.name}: ${lifeSummary(life, quoted)}`}
      interval={life.years ? [life.years.lower, life.years.upper] : undefined}
      estimate={life.years?.estimate}
      quoted={quoted}
      status={life.status === 'beyond' ? 'extrapolated' : life.status}
    />
  );
}

function LifeValue({ entry: { life, absence } }: { entry: CellEntry }) {
  if (!life) return <Quiet>{absenceWords[absence ?? 'noFit'].short}</Quiet>;
  if (!life.years) return <Quiet>no figure</Quiet>;
  const { value, range } = lifeFigure(life);
  return (
    <Text>
      <Figure size="lead" strong>
        {value}
      </Figure>
      {range !== '' && <Figure tone="quiet">{` (${range})`}</Figure>}
      <Text weight="strong">{' y'}</Text>
    </Text>
  );
}

const statusWords = (status: string): string => (status === 'beyond' ? 'beyond the readings' : status);

const styles = StyleSheet.create({
  row: { paddingVertical: space.l, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  wide: { flexDirection: 'row', alignItems: 'center', gap: space.xl, paddingVertical: space.m },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.m },
  shrink: { flexShrink: 1, minWidth: 0 },
});
