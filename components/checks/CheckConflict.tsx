import { Banner, Button, DefinitionList, Text } from '@/components/ui';
import type { Check } from '@/lib/contract/checks';

import { checkFormSchema } from './checkSchema';
import type { CheckFormValues } from './checkValues';
import { type Difference, differencesBetween } from './differences';

interface CheckConflictProps {
  /** As it stands on the server. */
  stored: Check;
  typed: CheckFormValues;
  onKeepMine: () => void;
  onTakeStored: () => void;
}

/** The check was changed elsewhere after this form was opened: both stand side by side, and one is chosen. */
export function CheckConflict({ stored, typed, onKeepMine, onTakeStored }: CheckConflictProps) {
  const read = checkFormSchema.safeParse(typed);
  return (
    <Banner
      kind="caution"
      title="The check was changed elsewhere meanwhile"
      actions={
        <>
          <Button label="Keep mine" onPress={onKeepMine} />
          <Button label="Take what is stored" onPress={onTakeStored} />
        </>
      }
    >
      <Text>Nothing of yours was sent yet, and what you typed is still here.</Text>
      {read.success ? (
        <Differences differences={differencesBetween(stored, read.data)} />
      ) : (
        <Text>Yours is not complete yet, so the two can not be shown side by side.</Text>
      )}
    </Banner>
  );
}

function Differences({ differences }: { differences: Difference[] }) {
  if (differences.length === 0) return <Text>The figures of both are the same.</Text>;
  return (
    <>
      <Text>Where the two differ:</Text>
      <DefinitionList
        items={differences.map(({ label, stored, typed }) => ({
          label,
          value: `stored ${stored ?? 'nothing'}, yours ${typed ?? 'nothing'}`,
        }))}
      />
    </>
  );
}
