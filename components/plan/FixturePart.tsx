import { clampingSentence } from '@/components/questions/questionWords';
import { Heading, Link, Quiet, Stack, Text } from '@/components/ui';
import { publicFitQuery } from '@/lib/client/fits';
import { fixtureBreakEven, type PlanResult } from '@/lib/plan';
import { formatNumber, formatQuantity } from '@/lib/units';
import { useQuery } from '@tanstack/react-query';

import type { PlanChoices } from './planForm';
import { wholeMoney } from './planWords';

/** Rates are told apart here where clamping is published by class. */
const classLimitIt = 0.3;

interface FixturePartProps {
  choices: PlanChoices;
  plan: PlanResult;
}

/** What a clamping fixture would have to add in life, against what the pool says that it adds at this rate. */
export function FixturePart({ choices: { fixtureMinor, currency, input }, plan }: FixturePartProps) {
  const { data } = useQuery(publicFitQuery());
  if (fixtureMinor === null) return null;
  const rateClass = plan.first.dischargeIt > classLimitIt ? 'clampingHighRate' : 'clampingLowRate';
  const effect = data?.fit?.effects.find((one) => one.lever === rateClass);
  const worth = fixtureBreakEven({
    bankMinor: plan.firstCostMinor,
    fixtureMinor,
    lifeYears: plan.years.estimate,
    discountRate: input.discountRate,
  });
  const price = wholeMoney(fixtureMinor, currency);
  return (
    <Stack gap="s">
      <Heading>Does a fixture pay?</Heading>
      <Text>
        {worth === null
          ? `No added life would pay for a fixture of ${price} at this rate of interest.`
          : `A fixture of ${price} pays when the bank lives ${formatQuantity(worth.breakEvenAddedYears, 'years', { decimals: 1 })} longer for it: ×${formatNumber(worth.breakEvenRatio, { decimals: 2 })}.`}
      </Text>
      {effect && <Text>{clampingSentence(effect, worth?.breakEvenRatio ?? null)}</Text>}
      <Quiet>
        A fixture also keeps cells in place; what the maker asks for comes first, and a swollen cell is never
        pressed flat.
      </Quiet>
      <Link href="/questions/clamping">Does clamping pay?</Link>
    </Stack>
  );
}
