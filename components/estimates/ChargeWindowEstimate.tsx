import { useState } from 'react';

import { FieldPair } from '@/components/forms';
import { NumberField } from '@/components/ui';
import {
  type CellLimits,
  type ChargeWindowResult,
  chargeWindowOffFraction,
  chargeWindowOfLimits,
} from '@/lib/measure';
import { formatNumber, formatPercent } from '@/lib/units';

import { Estimate } from './Estimate';
import { positive, roughText } from './estimateText';

export interface ChargeWindowEstimateProps {
  /** As the bank says them; they can be typed where it does not. */
  limits: CellLimits;
  /** Depth of a typical day, 0..1, where it is known. */
  depthFraction: number | null;
  /** Takes both ends in per cent, as text. */
  onUse: (window: { low: string; high: string }) => void;
}

const problems: Record<Extract<ChargeWindowResult, { ok: false }>['reason'], string | undefined> = {
  noChargeLimit: undefined,
  noDischargeLimit: undefined,
  chargeLimitFlat: 'Below 3.4 V the curve is flat: a charge that ends there may be anywhere from 30 to 90 %.',
  dischargeLimitFlat:
    'Above 3.1 V the curve is flat: enter the depth first, then the low end follows from it.',
};

const startOf = (value: number | null) => (value === null ? '' : String(value));

/** The daily window of the state of charge from the limits set on charger and BMS. */
export function ChargeWindowEstimate({ limits, depthFraction, onUse }: ChargeWindowEstimateProps) {
  const [charge, setCharge] = useState(startOf(limits.chargeLimitV));
  const [discharge, setDischarge] = useState(startOf(limits.dischargeLimitV));
  const typed = { chargeLimitV: positive(charge) ?? null, dischargeLimitV: positive(discharge) ?? null };
  const depth = depthFraction !== null && depthFraction > 0 && depthFraction <= 1 ? depthFraction : null;
  const window = chargeWindowOfLimits(typed, depth);
  return (
    <Estimate
      label="Estimate it from the limits set"
      lines={[
        'high = by the charge limit, from a table',
        'low = high − depth, not below the discharge limit',
        ...(window.ok ? linesOf(window, depth) : []),
      ]}
      caveat={`Voltage is a poor gauge of LFP: from about 15 to 90 % its curve is flat. Only limits outside that part say something, and to ${formatPercent(chargeWindowOffFraction)} of the capacity at best. Common practice, no source.`}
      result={window.ok ? windowText(window) : undefined}
      problem={window.ok ? undefined : problems[window.reason]}
      onUse={() =>
        window.ok &&
        onUse({ low: roughText(window.lowFraction * 100, 2), high: roughText(window.highFraction * 100, 3) })
      }
    >
      <FieldPair>
        <NumberField label="Charge ends at" note="per cell" unit="V" value={charge} onChange={setCharge} />
        <NumberField
          label="Discharge ends at"
          note="per cell"
          unit="V"
          value={discharge}
          onChange={setDischarge}
        />
      </FieldPair>
    </Estimate>
  );
}

type Window = Extract<ChargeWindowResult, { ok: true }>;

const windowText = ({ lowFraction, highFraction }: Window) =>
  `${formatNumber(lowFraction * 100, { decimals: 0 })} to ${formatPercent(highFraction)}`;

const linesOf = (window: Window, depth: number | null) => [
  window.lowBy === 'depth' && depth !== null
    ? `${formatPercent(window.highFraction)} − ${formatPercent(depth)}: ${windowText(window)}`
    : `by both limits: ${windowText(window)}`,
];
