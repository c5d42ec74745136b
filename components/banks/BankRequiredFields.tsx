import { useWatch } from 'react-hook-form';

import { BoundMonth, BoundNumber, BoundRadio, BoundSelect, BoundText, FieldPair } from '@/components/forms';
import { type Option, Quiet, Stack } from '@/components/ui';
import type { CellTypeBrief } from '@/lib/contract/banks';
import { limits } from '@/lib/contract/limits';
import { calendarDateOf, formatQuantity, parseNumber } from '@/lib/units';

import type { BankControl } from './BankForm';
import { optionsOf } from './bankWords';

const bought: Option[] = optionsOf({ new: 'New', used: 'Used', unknown: 'Not known' }).map((option) => ({
  ...option,
  hint: option.value === 'new' ? undefined : 'You get your own curve; pooled lives leave it out.',
}));

const clamping: readonly Option[] = [
  { value: 'none', label: 'Not clamped', hint: 'Loose, or only held in place.' },
  { value: 'rigid', label: 'Rigid end plates', hint: 'Plates and rods that do not give way.' },
  { value: 'sprung', label: 'Sprung end plates', hint: 'Springs or pads keep the force as the cells swell.' },
];

/** What every bank has to say of itself. */
export function BankRequiredFields({
  control,
  cellTypes,
}: {
  control: BankControl;
  cellTypes: CellTypeBrief[];
}) {
  const thisMonth = calendarDateOf(new Date(), 'local').slice(0, 7);
  return (
    <Stack gap="xl">
      <BoundText
        control={control}
        name="name"
        label="Name"
        hint="For yourself only, such as the place it stands in."
        maxLength={limits.nameLength.max}
      />
      <BoundSelect
        control={control}
        name="cellTypeId"
        label="Cell type"
        hint="Maker and name as on the cells. A bank is of one cell type."
        prompt="Choose the cell type"
        options={cellTypes.map(({ id, maker, name, ratedAh }) => ({
          value: id,
          label: `${maker} ${name}, ${formatQuantity(ratedAh, 'Ah')}`,
        }))}
      />
      <Stack gap="s">
        <FieldPair>
          <BoundNumber control={control} name="parallel" label="Cells in parallel" unit="cells" whole />
          <BoundNumber control={control} name="series" label="Groups in series" unit="groups" whole />
        </FieldPair>
        <LayoutRemark control={control} cellTypes={cellTypes} />
      </Stack>
      <BoundMonth
        control={control}
        name="firstUseMonth"
        label="First use"
        hint="The month it was first cycled in earnest."
        min="1990-01"
        max={thisMonth}
      />
      <BoundRadio control={control} name="bought" label="Bought" options={bought} />
      <BoundRadio
        control={control}
        name="clamping"
        label="How the cells are held"
        hint="Never press harder than the cells' maker allows, and never press a swollen cell flat."
        options={clamping}
      />
    </Stack>
  );
}

/** What the layout comes to, from what is typed here alone. */
function LayoutRemark({ control, cellTypes }: { control: BankControl; cellTypes: CellTypeBrief[] }) {
  const [cellTypeId, parallelText, seriesText] = useWatch({
    control,
    name: ['cellTypeId', 'parallel', 'series'],
  });
  const cellType = cellTypes.find(({ id }) => id === cellTypeId);
  const [parallel, series] = [parseNumber(parallelText), parseNumber(seriesText)];
  if (!cellType || !parallel || !series) return <Quiet>One cell after another is 1 in parallel.</Quiet>;
  const rated = formatQuantity(cellType.ratedAh * parallel, 'Ah');
  const volts = formatQuantity(cellType.nominalV * series, 'V', { decimals: 1 });
  return <Quiet aria-live="polite">{`${parallel * series} cells: ${rated} rated, ${volts} nominal.`}</Quiet>;
}
