import { useState } from 'react';
import { useWatch } from 'react-hook-form';

import { BoundMonth, BoundSelect } from '@/components/forms';
import { Button, Quiet, Row, Stack } from '@/components/ui';
import type { CellTypeChoice } from '@/lib/contract/banks';
import { formatQuantity } from '@/lib/units';

import type { BankFieldsProps } from './bankFormTypes';
import { ProposeCellDialog } from './ProposeCellDialog';

const labelOf = ({ maker, name, ratedAh, isProposed }: CellTypeChoice) =>
  `${maker} ${name}, ${formatQuantity(ratedAh, 'Ah')}${isProposed ? ', your proposal' : ''}`;

/** Which cells a bank is of, and when they were made. */
export function CellsFields({ form, cellTypes }: BankFieldsProps) {
  const { control, setValue } = form;
  const [isProposing, setIsProposing] = useState(false);
  const chosenId = useWatch({ control, name: 'cellTypeId' });
  const chosen = cellTypes.find(({ id }) => id === chosenId);
  const choose = (id: string) => {
    setValue('cellTypeId', id, { shouldDirty: true, shouldTouch: true, shouldValidate: true });
    setIsProposing(false);
  };
  return (
    <Stack gap="xl">
      <Stack gap="s">
        <BoundSelect
          control={control}
          name="cellTypeId"
          label="Cell type"
          hint="Maker and name as on the cells."
          prompt="Choose the cell type"
          options={cellTypes.map((cellType) => ({ value: cellType.id, label: labelOf(cellType) }))}
        />
        {chosen?.isProposed && (
          <Quiet>
            Your proposal: a moderator lists it. You can go on meanwhile; only you and moderators see it.
          </Quiet>
        )}
        <Row>
          <Button kind="quiet" label="It is not in the list" onPress={() => setIsProposing(true)} />
        </Row>
      </Stack>
      <BoundMonth
        control={control}
        name="madeMonth"
        label="Month of manufacture"
        hint="On the label or in the code on the cells. Leave it empty if not known."
        optional
        min="1990-01"
      />
      {isProposing && (
        <ProposeCellDialog cellTypes={cellTypes} onChoose={choose} onClose={() => setIsProposing(false)} />
      )}
    </Stack>
  );
}
