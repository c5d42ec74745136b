import { View } from 'react-native';

import { useLayout } from '@/components/theme';
import { Banner, EmptyState, type GaugeScale, Lead, ScaleHead, Stack } from '@/components/ui';
import type { CellEntry, CellList } from '@/lib/contract/cells';

import { listColumns } from './listColumns';
import { LifetimeRow } from './LifetimeRow';
import { carriedClaims } from './cellWords';
import { sentenceOfUse, toldOf } from './lifeWords';
import { waitingSentence } from './poolWords';

/** The list of cell types, longest life first, those without a figure last. */
export function LifetimeList({ list }: { list: CellList }) {
  const { isWide } = useLayout();
  const waiting = waitingSentence(list.pool);
  const scale = sharedScale(list.cells);
  if (list.cells.length === 0)
    return (
      <EmptyState title="No cell types yet">Cell types appear here when moderators list them.</EmptyState>
    );
  return (
    <Stack gap="l">
      <Lead tone="ink">{sentenceOfUse(list.use)}</Lead>
      {waiting && (
        <Banner kind="info" title="Waiting to be published">
          {waiting}
        </Banner>
      )}
      <View>
        <View style={isWide && listColumns.head}>
          {isWide && <View style={listColumns.name} />}
          <View style={isWide && listColumns.gauge}>
            <ScaleHead scale={scale} ticks={ticksOf(scale)} title="years to 80 %" />
          </View>
          {isWide && <View style={listColumns.value} />}
        </View>
        <View role="list" aria-label="Cell types by measured life">
          {byLife(list.cells).map((entry) => (
            <LifetimeRow key={entry.cellType.id} entry={entry} scale={scale} />
          ))}
        </View>
      </View>
    </Stack>
  );
}

const step = 5;

/** From 0 to just past the longest range of banks that is told, with its label. */
function sharedScale(cells: CellEntry[]): GaugeScale {
  const ends = cells.flatMap(({ life, claims }) => [
    life && ['figure', 'range'].includes(toldOf(life)) ? (life.rangeOfBanks?.upper ?? life.years.upper) : 0,
    carriedClaims(claims)[0]?.label.impliedYears.estimate ?? 0,
  ]);
  const longest = Math.min(30, Math.max(10, ...ends));
  return { min: 0, max: Math.ceil(longest / step) * step };
}

function ticksOf({ max }: GaugeScale): number[] {
  return Array.from({ length: max / step }, (_, index) => index * step);
}

/** A life past what can be told is still the longest; one that is the pool's says nothing of the cell type. */
function byLife(cells: CellEntry[]): CellEntry[] {
  const lifeOf = ({ life }: CellEntry) => {
    if (!life) return -2;
    return life.basis === 'pool' ? -1 : life.years.estimate;
  };
  return [...cells].sort((a, b) => lifeOf(b) - lifeOf(a) || a.cellType.name.localeCompare(b.cellType.name));
}
