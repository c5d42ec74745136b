import { DefinitionList, Heading, Stack } from '@/components/ui';
import type { Health } from '@/lib/contract/steward';
import { formatCount, formatInstant, formatPercent } from '@/lib/units';

import { bytesWords } from './healthWords';

/** Less than this is left of the disk: time to make room. */
const fewFree = 0.1;

/** The machine's room, the last backup, and which program runs. */
export function ProgramPart({ health }: { health: Health }) {
  const { storage, lastBackup, program } = health;
  const freeFraction = storage.diskFreeBytes / storage.diskBytes;
  return (
    <Stack gap="m">
      <Heading>Data and program</Heading>
      <DefinitionList
        items={[
          {
            label: 'Last backup',
            value: lastBackup
              ? `${formatInstant(lastBackup.at)}${lastBackup.bytes === null ? '' : `, ${bytesWords(lastBackup.bytes)}`}`
              : 'none yet',
            tone: lastBackup ? 'ink' : 'rust',
          },
          {
            label: 'Room on the disk',
            value: `${bytesWords(storage.diskFreeBytes)} free of ${bytesWords(storage.diskBytes)} (${formatPercent(freeFraction)})`,
            tone: freeFraction < fewFree ? 'rust' : 'ink',
          },
          { label: 'Database', value: bytesWords(storage.databaseBytes) },
          {
            label: 'Logs and photos',
            value: `${formatCount(storage.uploads)} files, ${bytesWords(storage.uploadBytes)}`,
          },
          {
            label: 'Version',
            value: program.revision ? `${program.version} (${program.revision})` : program.version,
          },
          { label: 'Running since', value: formatInstant(program.startedAt) },
        ]}
      />
    </Stack>
  );
}
