import { cautions } from '@/components/checks/cautions';
import { Figure, Heading, Quiet, Stack, Text } from '@/components/ui';
import type { RecordContent } from '@/lib/contract/records';
import { formatRange } from '@/lib/units';

import { digestWords } from './recordWords';

interface RecordNotesProps {
  digest: string;
  checks: RecordContent['checks'];
}

/** How the figures came about, what they do not say, the cautions, and how to tell a copy from the record. */
export function RecordNotes({ digest, checks }: RecordNotesProps) {
  const margins = checks.map(({ plusMinusFraction }) => plusMinusFraction * 100);
  const [least, most] = [Math.min(...margins), Math.max(...margins)];
  return (
    <>
      <Stack gap="s">
        <Heading>Method and uncertainty</Heading>
        <Text>
          Each check is one full discharge with its charge counted, brought to 25 °C and 0.2 It, and looked at
          by a moderator, who sees figures and no person. It is the owner who measured; nobody from the
          exchange has seen the bank. Figures are shares of the rated capacity, rounded to whole per cents.
        </Text>
        <Text>
          {`± is at 95 % (k = 2), here ${formatRange(least, most, { decimals: 1 })} %: reading noise, temperature correction, the ends of charge and discharge, imbalance. The meter's own gain error, the same at each of its checks, comes on top. Standing and forecast are statements about what is likely, by the pooled model with its 90 % ranges; no sudden drop late in life is modelled.`}
        </Text>
      </Stack>
      <Stack gap="s">
        <Heading>Safety</Heading>
        <Text>
          80 % is a convention for the end of life, not a safety statement, and this record says nothing of
          the state of wiring, fuses, the BMS or single cells.
        </Text>
        {cautions.map(({ title, points }) => (
          <Quiet key={title}>{`${title}: ${points.join(' ')}`}</Quiet>
        ))}
      </Stack>
      <Stack gap="s">
        <Heading>To verify a copy</Heading>
        <Text>
          Open the link below: it shows this record unchanged with the same digest, or that its owner has
          withdrawn it.
        </Text>
        <Figure selectable style={{ wordBreak: 'break-all' } as object}>
          {window.location.href}
        </Figure>
        <Quiet>{`Digest ${digestWords(digest)}: the first characters of the SHA-256 over what this record says.`}</Quiet>
      </Stack>
    </>
  );
}
