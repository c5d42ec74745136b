import { Button, Row, SelectField, Stack } from '@/components/ui';
import type { CellEntry } from '@/lib/contract/cells';

import { mostCompared } from './comparedCells';

interface ChooseCellsProps {
  cells: readonly CellEntry[];
  ids: readonly string[];
  onChange: (ids: string[]) => void;
}

/** The cell types compared, each with a way to drop it, and one more to choose. */
export function ChooseCells({ cells, ids, onChange }: ChooseCellsProps) {
  const nameOf = (id: string) => cells.find(({ cellType }) => cellType.id === id)?.cellType.name ?? id;
  const left = cells.filter(({ cellType }) => !ids.includes(cellType.id));
  return (
    <Stack gap="s">
      {ids.length > 0 && (
        <Row>
          {ids.map((id) => (
            <Button
              key={id}
              label={nameOf(id)}
              description={`Drop ${nameOf(id)} from the comparison`}
              icon="close"
              onPress={() => onChange(ids.filter((one) => one !== id))}
            />
          ))}
        </Row>
      )}
      {ids.length < mostCompared && (
        <SelectField
          label={ids.length === 0 ? 'Cell type' : 'Add a cell type'}
          value=""
          prompt="Choose one"
          options={left.map(({ cellType }) => ({
            value: cellType.id,
            label: `${cellType.name}, ${cellType.maker}`,
          }))}
          onChange={(id) => onChange([...ids, id])}
        />
      )}
    </Stack>
  );
}
