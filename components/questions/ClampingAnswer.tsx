import { useState } from 'react';

import { effectNote, ratioWords, verdictWords } from '@/components/cells/effectWords';
import { ClampingPart } from '@/components/method/ClampingPart';
import { StrataPart } from '@/components/method/StrataPart';
import { Heading, Lead, NumberField, Points, Readout, Readouts, Stack, Text } from '@/components/ui';
import type { LeverEffect } from '@/lib/contract/effects';
import type { PublishedFitReport } from '@/lib/contract/fits';
import { lifeAt, type PublishedFit } from '@/lib/fit/pooled/published';
import { fixtureBreakEven } from '@/lib/plan';
import { formatNumber, noValue, parseNumber } from '@/lib/units';

import { heldUse } from './LeverPlot';
import { clampingSentence, commonCaveats, conclusion } from './questionWords';
import { WorthPart } from './WorthPart';

const caveats = [
  'People who clamp may be more careful in other things. The tables above say how alike their banks are.',
  'Force differs from bank to bank and is mostly an estimate; the figures hold clamped against not, whatever the force.',
  'A maker’s own figure may have been measured in a fixture: then a bank without one is used outside its conditions.',
];
const safety = [
  'Never over-compress: the maker’s force or pressure is the limit, and cells need room to breathe over a cycle.',
  'A swollen cell means stop. It is never pressed flat, by a fixture or otherwise.',
  'Building a fixture is work on a bank: very high short-circuit currents, insulated tools, no jewellery, eye protection. The makers’ instructions and local codes come first.',
];

/** Whether clamping pays: by rate class, the readings, the break-even of a fixture, the caveats. */
export function ClampingAnswer({ fit, report }: { fit: PublishedFit; report: PublishedFitReport }) {
  const effects = report.effects.filter(({ lever }) => lever.startsWith('clamping'));
  if (effects.length === 0) return <Lead>Too few owners clamp, or do not, to say anything yet.</Lead>;
  return (
    <Stack gap="xl">
      <Stack gap="m">
        {effects.map((effect) => (
          <Text
            key={effect.lever}
            size="lead"
          >{`${className(effect)}: ${conclusion(effect, 'Clamping', 'A clamped bank')}`}</Text>
        ))}
        <Readouts>
          {effects.map((effect) => (
            <Readout
              key={effect.lever}
              value={ratioWords(effect) ?? noValue}
              unit="life"
              tone={effect.verdict === 'shown' ? 'tide' : 'quiet'}
            >
              {`${className(effect)}: ${verdictWords(effect)}; ${effectNote(effect)}`}
            </Readout>
          ))}
        </Readouts>
      </Stack>
      <StrataPart fit={report} />
      <FixtureWorth fit={fit} effects={effects} />
      <ClampingPart fit={report} />
      <Stack gap="s">
        <Heading>What could mislead</Heading>
        <Points points={[...caveats, ...commonCaveats]} />
      </Stack>
      <Stack gap="s">
        <Heading>Safety</Heading>
        <Points points={safety} />
      </Stack>
    </Stack>
  );
}

function FixtureWorth({ fit, effects }: { fit: PublishedFit; effects: readonly LeverEffect[] }) {
  const [fixture, setFixture] = useState('150');
  const price = parseNumber(fixture);
  const problem = price === undefined || price < 0 ? 'Enter an amount from 0.' : undefined;
  const lifeYears = lifeAt(fit, heldUse).years.estimate;
  return (
    <WorthPart
      more={
        <NumberField
          label="Price of the fixture"
          unit=""
          hint="Plates, rods, springs, in the same money."
          value={fixture}
          onChange={setFixture}
          error={problem}
        />
      }
    >
      {({ price: bankMinor, discountRate }) => {
        if (problem || price === undefined) return null;
        const worth = fixtureBreakEven({ bankMinor, fixtureMinor: price, lifeYears, discountRate });
        return (
          <Stack gap="s">
            <Text>
              {worth === null
                ? 'No added life would pay for it at this rate of interest.'
                : `On a bank that lives ${formatNumber(lifeYears, { decimals: 0 })} years without it, the fixture pays when it adds ${formatNumber(worth.breakEvenAddedYears, { decimals: 1 })} years: ×${formatNumber(worth.breakEvenRatio, { decimals: 2 })}.`}
            </Text>
            {effects.map((effect) => (
              <Text key={effect.lever}>{clampingSentence(effect, worth?.breakEvenRatio ?? null)}</Text>
            ))}
          </Stack>
        );
      }}
    </WorthPart>
  );
}

const className = ({ lever }: LeverEffect) => (lever === 'clampingLowRate' ? 'Below 0.3 It' : 'Above 0.3 It');
