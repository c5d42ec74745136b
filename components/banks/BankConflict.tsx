import { Banner, Button, DefinitionList, Text } from '@/components/ui';

import { fieldLabels } from './fieldLabels';
import type { BankFormValues } from './bankValues';

interface BankConflictProps {
  stored: BankFormValues;
  typed: BankFormValues;
  onKeepMine: () => void;
  onTakeStored: () => void;
}

type Field = keyof typeof fieldLabels;

/** The bank was changed elsewhere after this form was opened: both stand side by side, and one is chosen. */
export function BankConflict({ stored, typed, onKeepMine, onTakeStored }: BankConflictProps) {
  const differing = (Object.keys(fieldLabels) as Field[]).filter((field) => stored[field] !== typed[field]);
  return (
    <Banner
      kind="caution"
      title="The bank was changed elsewhere meanwhile"
      actions={
        <>
          <Button label="Keep mine" onPress={onKeepMine} />
          <Button label="Take what is stored" onPress={onTakeStored} />
        </>
      }
    >
      <Text>Nothing was saved yet, and what you typed is still here. Where the two differ:</Text>
      <DefinitionList
        items={differing.map((field) => ({
          label: fieldLabels[field],
          value: `stored ${stored[field] || 'nothing'}, yours ${typed[field] || 'nothing'}`,
        }))}
      />
    </Banner>
  );
}
