import { useMemo } from 'react';

import { BinChart, type BinPoint } from '@/components/charts';
import { residualWords } from '@/components/method/fitWords';
import { Quiet, Stack, Text } from '@/components/ui';
import type { PublishedFitReport } from '@/lib/contract/fits';
import { capacityAt, defaultScenarios, type PublishedFit, type Use } from '@/lib/fit/pooled/published';
import { formatNumber } from '@/lib/units';

import type { LeverQuestion } from './questions';

interface LeverPlotProps {
  question: LeverQuestion;
  fit: PublishedFit;
  report: PublishedFitReport;
}

/** The use everything but the lever is held at. */
export const heldUse: Use = defaultScenarios.find(({ name }) => name === 'typical_unclamped')!;

/** The effect against the readings: what is left over in each class, set upon the model's line for that class. */
export function LeverPlot({ question, fit, report }: LeverPlotProps) {
  const { condition } = question;
  const words = residualWords[condition];
  const bins = report.residuals.find((one) => one.condition === condition)?.bins;
  const points = useMemo(() => adjustedPoints(fit, question, bins ?? []), [fit, question, bins]);
  if (points.length < 2) return <Quiet>Too few owners stand in the classes of this condition yet.</Quiet>;
  const years = formatNumber(fit.reach.years, { decimals: 0 });
  return (
    <Stack gap="s">
      <BinChart
        title={`Capacity left after ${years} years by ${words.label.toLowerCase()}, the rest held fixed`}
        hasHeading
        series={[{ label: 'checks, adjusted', mark: 'circle', points }]}
        xName={words.xName}
        unitX={words.unitX}
        formatX={words.format}
        yTitle={`capacity left after ${years} years, % of rated: median and middle 80 %`}
        yTitleShort={`left after ${years} years, %`}
        finding="The line is the model; circles on it say that the checks agree with it."
        computed={
          <Text>
            Each circle is the median of the checks of one class: what was measured less what the model
            predicts for each check’s own conditions and age, added to the model’s line for the class at 70 %
            depth, 0.2 It, 25 °C, 60 % full on average, 200 full cycles a year and not clamped, with this
            condition moved. Each stands for at least five owners.
          </Text>
        }
      />
    </Stack>
  );
}

/** Residual medians set upon the model's capacity at the middle of their class. */
export function adjustedPoints(
  fit: PublishedFit,
  { condition }: Pick<LeverQuestion, 'condition'>,
  bins: PublishedFitReport['residuals'][number]['bins'],
): BinPoint[] {
  return bins.flatMap(({ evidence, ...bin }) => {
    const { from, to } = bin;
    if (from === null && to === null) return [];
    const middle = from === null ? to! : to === null ? from : (from + to) / 2;
    const model = capacityAt(fit, { ...heldUse, [condition]: middle }, fit.reach.years).estimate;
    return {
      ...{ from, to, owners: evidence.owners, checks: evidence.checks, model },
      median: model * (1 + bin.median),
      lower: model * (1 + bin.lower),
      upper: model * (1 + bin.upper),
    };
  });
}
