import type { ReactNode } from 'react';

import { BoundNumber } from '@/components/forms';
import { parseNumber } from '@/lib/units';

import type { CheckControl } from './formTypes';

interface BoundRateProps {
  control: CheckControl;
  field: 'dischargeIt' | 'chargeIt' | 'peakIt';
  /** Rated capacity of the bank, Ah: 1 It is as many amperes. */
  ratedAh: number;
  label: string;
  hint?: string;
  optional?: boolean;
  footer?: ReactNode;
}

const digits = 6;

/** A current in use: typed in amperes or in It, held in It. */
export function BoundRate({ field, ratedAh, ...rest }: BoundRateProps) {
  const convertTyped = (text: string, from: 'A' | 'It', to: 'A' | 'It') => {
    const value = parseNumber(text);
    if (value === undefined || from === to) return text;
    return String(Number((to === 'It' ? value / ratedAh : value * ratedAh).toPrecision(digits)));
  };
  return (
    <BoundNumber
      {...rest}
      name={`conditions.${field}`}
      unit="It"
      units={['A', 'It']}
      firstUnit="A"
      convertTyped={convertTyped}
    />
  );
}
