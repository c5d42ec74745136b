import { useState, type ReactNode } from 'react';

import { Banner, Button, Dialog, Quiet, RadioGroup, Row, SentenceUse, Stack, Text } from '@/components/ui';

import { usePresets } from './presets';
import { useSentenceParts } from './sentenceParts';
import type { ChosenUse } from './useChosenUse';

interface UseSentenceProps {
  chosen: ChosenUse;
  /** Beside the choice of a use by its name. */
  children?: ReactNode;
}

/** The use a page is at, as a sentence to be changed word by word or taken by its name. */
export function UseSentence({ chosen: { use, notes, setUse }, children }: UseSentenceProps) {
  const [isOpen, setIsOpen] = useState(false);
  const current = usePresets.find((preset) => JSON.stringify(preset.use) === JSON.stringify(use));
  return (
    <Stack gap="s">
      {notes.length > 0 && (
        <Banner kind="caution" title="Not all of the address could be read">
          {notes.join(' ')}
        </Banner>
      )}
      <SentenceUse parts={useSentenceParts} value={use} onChange={setUse} />
      <Row justify="space-between">
        <Button kind="quiet" label="Take a use by its name" onPress={() => setIsOpen(true)} />
        {children}
      </Row>
      <Dialog isOpen={isOpen} onClose={() => setIsOpen(false)} title="A use by its name">
        <Stack>
          <RadioGroup
            label="Used as"
            value={current?.key ?? ''}
            onChange={(key) => {
              const preset = usePresets.find((one) => one.key === key);
              if (preset) setUse(preset.use);
            }}
            options={usePresets.map(({ key, name, hint }) => ({ value: key, label: name, hint }))}
          />
          <Quiet>
            The figures behind the names are common practice, no source. Change them word by word.
          </Quiet>
          {current === undefined && <Text size="small">Now: a use of your own.</Text>}
          <Button kind="primary" wide label="Done" onPress={() => setIsOpen(false)} />
        </Stack>
      </Dialog>
    </Stack>
  );
}
