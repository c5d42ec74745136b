import { useState } from 'react';

import { NumberField } from '@/components/ui';
import { type BankSize, rateFromPower } from '@/lib/measure';
import { formatNumber, formatQuantity } from '@/lib/units';

import { Estimate } from './Estimate';
import { positive, roughText } from './estimateText';
import { type Metered, MeteredWhere, shareSeen, shareSeenWords } from './MeteredWhere';

export interface RateEstimateProps {
  bank: BankSize;
  /** Takes the rate in It, as text. */
  onUse: (rateIt: string) => void;
}

/** Mean rate in use from the power drawn. */
export function RateEstimate({ bank, onUse }: RateEstimateProps) {
  const [power, setPower] = useState('');
  const [metered, setMetered] = useState<Metered>('house');
  const watts = positive(power);
  const share = shareSeen[metered];
  const rate = watts === undefined ? undefined : rateFromPower(watts, bank, share);
  const size = `(${formatQuantity(bank.ratedAh, 'Ah')} × ${formatQuantity(bank.nominalV, 'V', { decimals: 1 })})`;
  const amperes = rate === undefined ? '' : formatQuantity(rate * bank.ratedAh, 'A', { decimals: 1 });
  return (
    <Estimate
      label="Estimate it from watts"
      lines={[
        'It = power / share metered / (rated Ah × nominal V)',
        ...(watts === undefined || rate === undefined
          ? []
          : [
              `${formatQuantity(watts, 'W')} / ${share} / ${size} = ${formatNumber(rate, { decimals: 3 })} It, ${amperes}`,
            ]),
      ]}
      caveat={`The mean while the bank is in use, not the peak. ${shareSeenWords}`}
      result={rate === undefined ? undefined : amperes}
      onUse={() => rate !== undefined && onUse(roughText(rate, 3))}
    >
      <NumberField label="Typical power in use" unit="W" value={power} onChange={setPower} />
      <MeteredWhere value={metered} onChange={setMetered} />
    </Estimate>
  );
}
