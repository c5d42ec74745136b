import { useState, type ReactNode } from 'react';

import { FieldPair } from '@/components/forms';
import { Heading, NumberField, Stack, Text } from '@/components/ui';
import { annuityFactor } from '@/lib/plan';
import { formatNumber, formatRange, parseNumber } from '@/lib/units';
import type { LeverEffect } from '@/lib/contract/effects';

export interface Worth {
  price: number;
  discountRate: number;
}

interface WorthPartProps {
  children: (worth: Worth) => ReactNode;
  /** Further fields beside price and interest. */
  more?: ReactNode;
}

const highestPercent = 30;

/** What an answer is worth for a bank of the visitor's own price, in whatever money it is typed in. */
export function WorthPart({ children, more }: WorthPartProps) {
  const [price, setPrice] = useState('2700');
  const [percent, setPercent] = useState('3');
  const priceRead = parseNumber(price);
  const percentRead = parseNumber(percent);
  const priceProblem = priceRead === undefined || priceRead <= 0 ? 'Enter an amount above 0.' : undefined;
  const percentProblem =
    percentRead === undefined || percentRead < 0 || percentRead > highestPercent
      ? `Enter 0 to ${highestPercent}.`
      : undefined;
  return (
    <Stack gap="m">
      <Heading>What it is worth</Heading>
      <FieldPair>
        <NumberField
          label="Price of the bank"
          hint="Cells and what ends with them, in your money."
          unit=""
          value={price}
          onChange={setPrice}
          error={priceProblem}
        />
        <NumberField
          label="Discount rate"
          hint="A year, above inflation."
          unit="%"
          value={percent}
          onChange={setPercent}
          error={percentProblem}
        />
      </FieldPair>
      {more}
      {!priceProblem && !percentProblem && children({ price: priceRead!, discountRate: percentRead! / 100 })}
    </Stack>
  );
}

interface YearlyWorthProps extends Worth {
  /** Life before the change, years. */
  lifeYears: number;
  effect: LeverEffect;
  change: string;
}

/** What a longer life saves a year: the bank repaid evenly over the shorter life less the same over the longer one. */
export function YearlyWorth({ price, discountRate, lifeYears, effect, change }: YearlyWorthProps) {
  if (effect.verdict === 'notMeasured') return null;
  const yearly = (years: number) => price / annuityFactor(discountRate, years);
  const before = yearly(lifeYears);
  const saved = (ratio: number) => before - yearly(lifeYears * ratio);
  const { estimate, lower, upper } = effect.ratio;
  const whole = { decimals: 0 };
  return (
    <Text>
      {`Repaid evenly over ${formatNumber(lifeYears, whole)} years, such a bank costs ${formatNumber(before, whole)} a year. ${change} saves ${formatNumber(saved(estimate), whole)} of it a year (${formatRange(saved(lower), saved(upper), whole)}).`}
    </Text>
  );
}
