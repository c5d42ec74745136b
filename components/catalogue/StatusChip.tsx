import { Chip } from '@/components/ui';
import type { CellTypeStatus } from '@/lib/contract/catalogue';

import { statusWords } from './catalogueWords';

const tones = { proposed: 'brass', listed: 'moss', declined: 'rust', merged: 'plain' } as const;

export function StatusChip({ status }: { status: CellTypeStatus }) {
  return <Chip tone={tones[status]}>{statusWords[status]}</Chip>;
}
