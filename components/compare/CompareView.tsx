import { useMemo } from 'react';

import { CompareChart } from '@/components/charts';
import { listAtUse } from '@/components/chosenUse/atUse';
import { publishedFitOf } from '@/components/chosenUse/publishedModel';
import type { ChosenUse } from '@/components/chosenUse/useChosenUse';
import { UseSentence } from '@/components/chosenUse/UseSentence';
import { outsideSentence } from '@/components/cells/lifeWords';
import { Banner, Button, EmptyState, Quiet, Row, ScreenOnly, Stack } from '@/components/ui';
import type { CellList } from '@/lib/contract/cells';
import type { PublicModel } from '@/lib/contract/model';
import { figureAt } from '@/lib/fit/pooled/published';

import { ChooseCells } from './ChooseCells';
import type { Compared } from './comparedCells';
import { DifferenceTable } from './DifferenceTable';
import { OutlastPart } from './OutlastPart';

interface CompareViewProps {
  list: CellList;
  model: PublicModel;
  chosen: ChosenUse;
  compared: Compared;
  onCompare: (ids: string[]) => void;
}

export function CompareView({ list, model, chosen, compared, onCompare }: CompareViewProps) {
  const { use } = chosen;
  const fit = useMemo(() => publishedFitOf(model), [model]);
  const atUse = useMemo(() => listAtUse(list, use), [list, use]);
  const known = compared.ids.flatMap((id) => atUse.cells.find(({ cellType }) => cellType.id === id) ?? []);
  // Only a figure of a cell type's own can be told apart from another's.
  const own = useMemo(
    () => known.filter(({ cellType }) => model.cellTypes.some(({ id }) => id === cellType.id)),
    [known, model],
  );
  const notes = [
    ...compared.notes,
    ...(known.length < compared.ids.length ? ['A cell type in it is not listed.'] : []),
  ];
  const outside = known.find(({ life }) => life && life.outside.length > 0)?.life?.outside;
  const curves = useMemo(
    () =>
      own.map(({ cellType }) => ({
        label: cellType.name,
        curve: figureAt(fit, use, cellType.id).curve.flatMap(
          ({ years, sohFraction, status, lower, upper }) =>
            status === 'beyond' ? [] : [{ x: years, soh: sohFraction, lower, upper, status }],
        ),
      })),
    [own, fit, use],
  );
  return (
    <Stack gap="xl">
      <Stack>
        <UseSentence chosen={chosen} />
        {notes.length > 0 && (
          <Banner kind="caution" title="Not all of the address could be read">
            {notes.join(' ')}
          </Banner>
        )}
        {outside && (
          <Banner kind="caution" title="Outside the pool">
            {outsideSentence(outside)}
          </Banner>
        )}
        <ScreenOnly>
          <ChooseCells
            cells={list.cells}
            ids={known.map(({ cellType }) => cellType.id)}
            onChange={onCompare}
          />
        </ScreenOnly>
      </Stack>
      {known.length < 2 ? (
        <EmptyState title={known.length === 0 ? 'Choose two cell types' : 'Choose one more'}>
          Two to four can be held against each other.
        </EmptyState>
      ) : (
        <Stack gap="xl">
          <DifferenceTable entries={known} />
          {own.length > 0 && !outside && (
            <CompareChart title="Capacity left over years, at this use" curves={curves} />
          )}
          {own.length > 1 && !outside && (
            <OutlastPart fit={fit} use={use} cells={own.map(({ cellType }) => cellType)} />
          )}
          {own.length < known.length && (
            <Quiet>
              Cell types with too few banks of their own are told by the pool’s figure; they are not drawn, as
              it would be the same for each.
            </Quiet>
          )}
          <ScreenOnly>
            <Row>
              <Button label="Print this comparison" onPress={() => window.print()} />
            </Row>
          </ScreenOnly>
        </Stack>
      )}
    </Stack>
  );
}
