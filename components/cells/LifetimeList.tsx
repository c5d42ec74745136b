import { View } from 'react-native';

import { listAtUse } from '@/components/chosenUse/atUse';
import { UseSentence } from '@/components/chosenUse/UseSentence';
import type { ChosenUse } from '@/components/chosenUse/useChosenUse';
import { useLayout } from '@/components/theme';
import { Banner, Button, EmptyState, type GaugeScale, Quiet, ScaleHead, Stack } from '@/components/ui';
import type { CellEntry, CellList } from '@/lib/contract/cells';
import { useMemo } from 'react';

import { carriedClaims } from './cellWords';
import { LifetimeRow } from './LifetimeRow';
import { LifetimeTable } from './LifetimeTable';
import { ListTools } from './ListTools';
import { arranged, type ListView } from './listView';
import { outsideSentence, toldOf } from './lifeWords';
import { waitingSentence } from './poolWords';

interface LifetimeListProps {
  list: CellList;
  chosen: ChosenUse;
  view: ListView;
  onViewChange: (view: ListView) => void;
}

/** The list of cell types at the use chosen, in the order asked for; those without a figure last. */
export function LifetimeList({ list, chosen, view, onViewChange }: LifetimeListProps) {
  const { isWide } = useLayout();
  const { use } = chosen;
  const atUse = useMemo(() => listAtUse(list, use), [list, use]);
  const cells = useMemo(() => arranged(atUse.cells, view), [atUse, view]);
  const scale = useMemo(() => sharedScale(atUse.cells), [atUse]);
  const waiting = waitingSentence(list.pool);
  const outside = atUse.cells.find(({ life }) => life && life.outside.length > 0)?.life?.outside;
  const tools = <ListTools view={view} onChange={onViewChange} isFolded={!isWide} />;
  if (list.cells.length === 0)
    return (
      <EmptyState title="No cell types yet">Cell types appear here when moderators list them.</EmptyState>
    );
  return (
    <Stack gap="m">
      <UseSentence chosen={chosen}>{!isWide && tools}</UseSentence>
      {isWide && tools}
      {outside && (
        <Banner kind="caution" title="Outside the pool">
          {outsideSentence(outside)}
        </Banner>
      )}
      {cells.length === 0 ? (
        <EmptyState
          title="No cell type is like that"
          action={
            <Button
              label="Show all"
              onPress={() => onViewChange({ ...view, find: '', form: 'all', own: undefined })}
            />
          }
        >
          None of the cell types listed fits what is asked for.
        </EmptyState>
      ) : isWide ? (
        <LifetimeTable {...{ cells, use, scale, view, onViewChange }} ticks={ticksOf(scale)} />
      ) : (
        <View>
          <ScaleHead scale={scale} ticks={ticksOf(scale)} title="years to 80 %" />
          <View role="list" aria-label="Cell types by measured life">
            {cells.map((entry) => (
              <LifetimeRow key={entry.cellType.id} entry={entry} use={use} scale={scale} />
            ))}
          </View>
        </View>
      )}
      <Quiet>
        Thick bar: 90 % range of the typical bank; thin line: 8 of 10 banks; diamond: what the label implies
        at this use. The price per kWh is the median price owners gave for a cell over the energy it delivers
        until 80 %: cells alone, prices as paid.
      </Quiet>
      {waiting && (
        <Banner kind="info" title="Waiting to be published">
          {waiting}
        </Banner>
      )}
    </Stack>
  );
}

const step = 5;

/** From 0 to just past the longest range of banks that is told, with its label. */
function sharedScale(cells: readonly CellEntry[]): GaugeScale {
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
