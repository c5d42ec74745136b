import { useState } from 'react';

import { FieldPair } from '@/components/forms';
import { NumberField, SelectField } from '@/components/ui';
import { clampForceOfSprings, clampForceOfTorque, torqueOffFraction, usualNutFactor } from '@/lib/measure';
import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import { Estimate } from './Estimate';
import { positive, roughText } from './estimateText';

export interface ForceEstimateProps {
  /** Takes the force in N, as text. */
  onUse: (forceN: string) => void;
}

const threads = [4, 5, 6, 8, 10, 12].map((mm) => ({ value: String(mm), label: `M${mm}` }));

const forceText = (newton: number) => formatQuantity(Number(newton.toPrecision(2)), 'N', { decimals: 0 });

/** Clamping force from the torque of the rods' nuts. */
export function TorqueEstimate({ torque, onUse }: ForceEstimateProps & { torque: string }) {
  const [thread, setThread] = useState('6');
  const [rods, setRods] = useState('4');
  const [torqueNm, threadMm, count] = [positive(torque), positive(thread), positive(rods)];
  const force = torqueNm && threadMm && count ? clampForceOfTorque({ torqueNm, threadMm, count }) : undefined;
  return (
    <Estimate
      label="Estimate it from the torque"
      lines={[
        'F = n × T / (K × d)',
        ...(force === undefined || torqueNm === undefined
          ? []
          : [
              `${rods.trim()} × ${formatNumber(torqueNm)} N·m / (${usualNutFactor} × ${thread} mm) = ${forceText(force)}`,
              `${forceText(force * (1 - torqueOffFraction))} to ${forceText(force * (1 + torqueOffFraction))}`,
            ]),
      ]}
      caveat={`Friction takes most of a torque and varies: ± ${formatPercent(torqueOffFraction)}. Nut factor K about ${usualNutFactor} for dry steel (Shigley's Mechanical Engineering Design, from memory); oiled threads press harder.`}
      result={force === undefined ? undefined : forceText(force)}
      problem={torqueNm === undefined ? 'Enter the torque in its field first.' : undefined}
      onUse={() => force !== undefined && onUse(roughText(force, 2))}
    >
      <FieldPair>
        <SelectField label="Thread of the rods" value={thread} onChange={setThread} options={threads} />
        <NumberField label="Rods that press one row" unit="rods" value={rods} onChange={setRods} whole />
      </FieldPair>
    </Estimate>
  );
}

/** Clamping force from springs of a known rate. */
export function SpringEstimate({ onUse }: ForceEstimateProps) {
  const [rate, setRate] = useState('');
  const [compression, setCompression] = useState('');
  const [springs, setSprings] = useState('4');
  const [rateNPerMm, compressionMm, count] = [positive(rate), positive(compression), positive(springs)];
  const force =
    rateNPerMm && compressionMm && count
      ? clampForceOfSprings({ rateNPerMm, compressionMm, count })
      : undefined;
  return (
    <Estimate
      label="Estimate it from springs"
      lines={[
        'F = n × rate × compression',
        ...(force === undefined || rateNPerMm === undefined || compressionMm === undefined
          ? []
          : [
              `${springs.trim()} × ${formatNumber(rateNPerMm)} N/mm × ${formatNumber(compressionMm)} mm = ${forceText(force)}`,
            ]),
      ]}
      caveat="Rate from the springs' data sheet; compression is how much shorter they are than when free. Good while no spring is pressed solid."
      result={force === undefined ? undefined : forceText(force)}
      onUse={() => force !== undefined && onUse(roughText(force, 2))}
    >
      <FieldPair>
        <NumberField label="Rate of one spring" unit="N/mm" value={rate} onChange={setRate} />
        <NumberField label="Compression" unit="mm" value={compression} onChange={setCompression} />
        <NumberField
          label="Springs that press one row"
          unit="springs"
          value={springs}
          onChange={setSprings}
          whole
        />
      </FieldPair>
    </Estimate>
  );
}
