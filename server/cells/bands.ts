import type { Band as BandContract, BandKind } from '@/lib/contract/cells';
import { allBands, type BandLever } from '@/lib/fit';

const kinds: Record<BandLever, BandKind> = {
  depth: 'depth',
  rate: 'rate',
  heat: 'temperature',
  clamping: 'clamping',
};

export interface AddressedBand {
  /** Key within a fit. */
  fitKey: string;
  /** As in addresses: `depth:deep`. */
  key: string;
  kind: BandKind;
  label: BandContract['label'];
}

/** The bands a page offers, under the keys of its address. */
export const addressedBands: readonly AddressedBand[] = allBands.map(({ key, lever, label }) => ({
  fitKey: key,
  key: `${kinds[lever]}:${key.slice(key.indexOf('-') + 1)}`,
  kind: kinds[lever],
  label,
}));
