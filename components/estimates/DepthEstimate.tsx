import { useState } from 'react';

import { NumberField } from '@/components/ui';
import { type BankSize, depthFromEnergy } from '@/lib/measure';
import { formatPercent, formatQuantity } from '@/lib/units';

import { Estimate } from './Estimate';
import { positive, roughText } from './estimateText';
import { type Metered, MeteredWhere, shareSeen, shareSeenWords } from './MeteredWhere';

export interface DepthEstimateProps {
  bank: BankSize;
  /** Takes the depth in per cent, as text. */
  onUse: (percent: string) => void;
}

/** Depth of a typical day from the energy taken out in a night. */
export function DepthEstimate({ bank, onUse }: DepthEstimateProps) {
  const [energy, setEnergy] = useState('');
  const [metered, setMetered] = useState<Metered>('house');
  const kWh = positive(energy);
  const share = shareSeen[metered];
  const depth = kWh === undefined ? undefined : depthFromEnergy(kWh * 1000, bank, share);
  const isPossible = depth !== undefined && depth <= 1;
  const size = `(${formatQuantity(bank.ratedAh, 'Ah')} × ${formatQuantity(bank.nominalV, 'V', { decimals: 1 })})`;
  return (
    <Estimate
      label="Estimate it from a night's energy"
      lines={[
        'depth = energy / share metered / (rated Ah × nominal V)',
        ...(kWh === undefined || depth === undefined
          ? []
          : [`${formatQuantity(kWh, 'kWh')} / ${share} / ${size} = ${formatPercent(depth)}`]),
      ]}
      caveat={`What the bank gives between two full charges, on a typical night. ${shareSeenWords}`}
      result={isPossible ? formatPercent(depth) : undefined}
      problem={depth !== undefined && depth > 1 ? 'That is more than the bank is rated to hold.' : undefined}
      onUse={() => isPossible && onUse(roughText(depth * 100, 2))}
    >
      <NumberField label="Energy in a typical night" unit="kWh" value={energy} onChange={setEnergy} />
      <MeteredWhere value={metered} onChange={setMetered} />
    </Estimate>
  );
}
