import { Disclosure, Heading, Points, Quiet, Stack } from '@/components/ui';

import { cautions, conventionSentence } from './cautions';

/** The cautions whole. */
export function Cautions() {
  return (
    <Stack gap="l">
      {cautions.map(({ title, points }) => (
        <Stack key={title} gap="s">
          <Heading size="lead">{title}</Heading>
          <Points points={points} />
        </Stack>
      ))}
      <Quiet>{conventionSentence}</Quiet>
    </Stack>
  );
}

/** The cautions folded, for steps that are filled in while the bank is worked on. */
export function CautionsFolded() {
  return (
    <Disclosure label="The cautions again">
      <Cautions />
    </Disclosure>
  );
}
