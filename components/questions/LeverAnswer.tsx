import { Heading, Lead, Points, Quiet, Readout, Readouts, Stack, Text } from '@/components/ui';
import { effectNote, ratioWords, verdictWords } from '@/components/cells/effectWords';
import type { LeverEffect } from '@/lib/contract/effects';
import type { PublishedFitReport } from '@/lib/contract/fits';
import { lifeAt, type PooledLife, type PublishedFit } from '@/lib/fit/pooled/published';
import { formatRange, noValue } from '@/lib/units';

import { heldUse, LeverPlot } from './LeverPlot';
import { commonCaveats, conclusion } from './questionWords';
import type { LeverQuestion } from './questions';
import { WorthPart, YearlyWorth } from './WorthPart';

interface LeverAnswerProps {
  question: LeverQuestion;
  effect: LeverEffect | undefined;
  fit: PublishedFit;
  report: PublishedFitReport;
}

/** The answer to a question of one lever: conclusion, lives at both ends, the readings, the money, the caveats. */
export function LeverAnswer({ question, effect, fit, report }: LeverAnswerProps) {
  if (!effect || typeof effect.from === 'boolean' || typeof effect.to === 'boolean')
    return <Lead>Too few owners stand behind this yet.</Lead>;
  const { condition, show, better, caveats, safety } = question;
  const lives = [effect.from, effect.to].map((value) => ({
    value,
    life: lifeAt(fit, { ...heldUse, [condition]: value }),
  }));
  const change = `Going from ${show(effect.from)} to ${show(effect.to)}`;
  return (
    <Stack gap="xl">
      <Stack gap="m">
        <Text size="lead">{conclusion(effect, change, better)}</Text>
        <Readouts>
          <Readout
            value={ratioWords(effect) ?? noValue}
            unit="life"
            tone={effect.verdict === 'shown' ? 'tide' : 'quiet'}
          >
            {`${verdictWords(effect)}; ${effectNote(effect)}`}
          </Readout>
          {lives.map(({ value, life }) => (
            <Readout key={value} value={lifeValue(life)} unit="years" tone="tide">
              {`${show(value)}: to 80 %, 90 % range, ${statusWords(life)}`}
            </Readout>
          ))}
        </Readouts>
        <Quiet>
          All else held at 70 % depth, 0.2 It, 25 °C, 60 % full on average, 200 full cycles a year, not
          clamped.
        </Quiet>
      </Stack>
      <LeverPlot question={question} fit={fit} report={report} />
      <WorthPart>
        {(worth) => (
          <YearlyWorth {...worth} lifeYears={lives[0]!.life.years.estimate} effect={effect} change={change} />
        )}
      </WorthPart>
      <Stack gap="s">
        <Heading>What could mislead</Heading>
        <Points points={[...caveats, ...commonCaveats]} />
      </Stack>
      {safety && (
        <Stack gap="s">
          <Heading>Safety</Heading>
          <Points points={[...safety, ...(condition === 'temperatureC' ? [coldest(fit)] : [])]} />
        </Stack>
      )}
    </Stack>
  );
}

/** A range only: what lies past the readings has no single figure worth printing large. */
const lifeValue = ({ years, status }: PooledLife): string =>
  status === 'beyond' ? noValue : formatRange(years.lower, years.upper, { decimals: 0 });

const statusWords = ({ status }: PooledLife): string =>
  status === 'beyond' ? 'beyond what the readings can say' : status;

function coldest(fit: PublishedFit): string {
  const heat = fit.reach.conditions.find(({ condition }) => condition === 'temperatureC');
  const lowest = heat ? Math.round(heat.from) : null;
  return lowest === null
    ? 'How cold is too cold for a long life is not measured.'
    : `The pool holds banks down to a mean of ${lowest} °C; nothing is said of colder ones.`;
}
