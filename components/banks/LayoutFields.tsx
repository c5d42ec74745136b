import { useWatch } from 'react-hook-form';

import { BoundMonth, BoundNumber, BoundText, FieldPair } from '@/components/forms';
import { Quiet, Stack } from '@/components/ui';
import { limits } from '@/lib/contract/limits';
import { calendarDateOf, formatQuantity, parseNumber } from '@/lib/units';

import type { BankFieldsProps } from './bankFormTypes';

/** How many cells, what the bank is called, and since when it has been in use. */
export function LayoutFields({ form, cellTypes }: BankFieldsProps) {
  const { control } = form;
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
      <Stack gap="s">
        <FieldPair>
          <BoundNumber
            control={control}
            name="parallel"
            label="Cells in parallel"
            hint="1 where each cell stands alone; 2 where they are joined in pairs."
            unit="cells"
            whole
          />
          <BoundNumber
            control={control}
            name="series"
            label="Groups in series"
            hint="4 for 12 V, 8 for 24 V, 16 for 48 V."
            unit="groups"
            whole
          />
        </FieldPair>
        <LayoutRemark form={form} cellTypes={cellTypes} />
      </Stack>
      <BoundMonth
        control={control}
        name="firstUseMonth"
        label="First use"
        hint="The month it was first cycled in earnest."
        min="1990-01"
        max={thisMonth}
      />
    </Stack>
  );
}

/** What the layout comes to, from what is typed here alone. */
function LayoutRemark({ form: { control }, cellTypes }: BankFieldsProps) {
  const [cellTypeId, parallelText, seriesText] = useWatch({
    control,
    name: ['cellTypeId', 'parallel', 'series'],
  });
  const cellType = cellTypes.find(({ id }) => id === cellTypeId);
  const [parallel, series] = [parseNumber(parallelText), parseNumber(seriesText)];
  if (!cellType || !parallel || !series) return null;
  const rated = formatQuantity(cellType.ratedAh * parallel, 'Ah');
  const volts = formatQuantity(cellType.nominalV * series, 'V', { decimals: 1 });
  return <Quiet aria-live="polite">{`${parallel * series} cells: ${rated} rated, ${volts} nominal.`}</Quiet>;
}
