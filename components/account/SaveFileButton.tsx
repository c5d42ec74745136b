import { Banner, Button, Stack } from '@/components/ui';
import { useSaveFile } from '@/lib/client/ownData';

import { problemOf } from './problemOf';

/** Saves a file of the API on this device; tells beside the button what went wrong. */
export function SaveFileButton({ path, label }: { path: string; label: string }) {
  const save = useSaveFile();
  return (
    <Stack gap="s">
      <Button label={label} busy={save.isPending} onPress={() => save.mutate(path)} />
      {save.error && (
        <Banner kind="error" title="The file was not saved">
          {problemOf(save.error)}
        </Banner>
      )}
    </Stack>
  );
}
