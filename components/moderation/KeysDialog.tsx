import { Checkbox, DefinitionList, Dialog, Quiet, Stack } from '@/components/ui';

import { keyWords, setAreKeysOn, useAreKeysOn } from './keys';

/** The single keys, and the switch that takes them away from those they are in the way of. */
export function KeysDialog({ onClose }: { onClose: () => void }) {
  const isOn = useAreKeysOn();
  return (
    <Dialog isOpen onClose={onClose} title="Keys">
      <Stack gap="m">
        <DefinitionList items={keyWords.map(({ key, does }) => ({ label: key, value: does }))} />
        <Quiet>They rest while you type, while a dialog is open, and together with Ctrl, Alt or Cmd.</Quiet>
        <Checkbox label="Single keys work here" checked={isOn} onChange={setAreKeysOn} />
      </Stack>
    </Dialog>
  );
}
