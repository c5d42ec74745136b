import { StyleSheet, View } from 'react-native';

import { space } from '@/components/theme';
import {
  Disclosure,
  Divider,
  Figure,
  Heading,
  Quiet,
  type Share,
  ShareBar,
  Stack,
  Text,
} from '@/components/ui';
import { budgetPartLabels, coverageFactor, flaggedDisagreement } from '@/lib/measure';
import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import { budgetAdvice, budgetHalves } from './budgetAdvice';
import { BudgetList } from './BudgetList';
import { conventionSentence } from './cautions';
import { plusMinusFraction } from './checkWords';
import type { ComputedCase } from './computedCase';
import { FormulaLines } from './FormulaLines';
import { cycleLines, judgementSentence, normalisationLines, sohLines, uncertaintyLines } from './formulas';

/** What was computed from a check: capacity with its budget, state of health, full cycles; each with how. */
export function ComputedView({ computedCase }: { computedCase: ComputedCase }) {
  return (
    <Stack gap="l">
      <CapacityPart computedCase={computedCase} />
      <Divider />
      <HealthPart computedCase={computedCase} />
      <Divider />
      <CyclesPart computedCase={computedCase} />
    </Stack>
  );
}

interface PartProps {
  computedCase: ComputedCase;
}

const sharesText = (parts: readonly Share[]) =>
  parts
    .filter(({ fraction }) => fraction >= 0.005)
    .map(({ label, fraction }) => `${label} ${formatPercent(fraction)}`)
    .join(', ');

/** As many as leave two digits of a ±: JCGM 100:2008, 7.2.6. */
const decimalsOf = (plusMinus: number) => (plusMinus >= 10 ? 0 : plusMinus >= 1 ? 1 : 2);

/** A figure at the right of its words, with its ± quieter. */
function FigureLine({ title, value, margin }: { title: string; value: string; margin?: string }) {
  return (
    <View style={styles.line}>
      <Heading size="lead">{title}</Heading>
      <Text>
        <Figure size="title" strong>
          {value}
        </Figure>
        {margin !== undefined && <Figure size="lead" tone="quiet">{` ${margin}`}</Figure>}
      </Text>
    </View>
  );
}

function CapacityPart({ computedCase }: PartProps) {
  const { computed } = computedCase;
  const { capacityRefAh, expandedAh, relSdMeter, budget, isCorrected } = computed;
  const decimals = decimalsOf(expandedAh);
  const parts = budget.newEachCheck.map(({ name, varianceShare }) => ({
    label: budgetPartLabels[name] ?? name,
    fraction: varianceShare,
  }));
  const shares = sharesText(parts);
  const meterAh = coverageFactor * relSdMeter * capacityRefAh;
  const halves = budgetHalves(computed);
  const advice = budgetAdvice(computed);
  return (
    <Stack gap="s">
      <FigureLine
        title={isCorrected ? 'At 25 °C and 0.2 It' : 'As measured, not corrected'}
        value={formatNumber(capacityRefAh, { decimals })}
        margin={`± ${formatQuantity(expandedAh, 'Ah', { decimals })}`}
      />
      <ShareBar parts={parts} summary={`Shares of the variance: ${shares}`} />
      <Text tone="quiet">
        {`95 %; from ${shares}. This meter's own error, ±${formatQuantity(meterAh, 'Ah', { decimals: decimalsOf(meterAh) })}, is the same at each check.`}
      </Text>
      {halves.length > 0 && (
        <>
          <ShareBar parts={halves} summary={`Both together: ${sharesText(halves)}`} />
          <Text tone="quiet">
            {`Both together, as shares of the variance: ${sharesText(halves)}. The meter's part moves all of this meter's checks alike, so it does not blur how the bank fades.`}
          </Text>
        </>
      )}
      {advice && <Text>{advice}</Text>}
      {!isCorrected && (
        <Text tone="brass">
          The test lies outside what can be brought to 25 °C and 0.2 It. The capacity stands as measured, and
          the check is flagged.
        </Text>
      )}
      <Disclosure label="How the capacity was computed">
        <FormulaLines lines={normalisationLines(computedCase)} />
        <Text>{judgementSentence}</Text>
        <FormulaLines lines={uncertaintyLines(computedCase)} />
        <Text>
          Quadrature as in JCGM 100:2008, k = 2 for about 95 %. Only what is new at each check weighs in a fit
          over several checks; the meter&apos;s own error belongs to the bank&apos;s start.
        </Text>
        <BudgetList budget={budget} />
      </Disclosure>
    </Stack>
  );
}

function HealthPart({ computedCase }: PartProps) {
  const { computed, bank } = computedCase;
  const ownStart = bank.startCapacityAh === null ? null : computed.capacityRefAh / bank.startCapacityAh;
  return (
    <Stack gap="s">
      <FigureLine
        title="State of health"
        value={formatNumber(computed.sohFraction * 100, { decimals: 1 })}
        margin={`± ${formatPercent(plusMinusFraction(computed), 1)}`}
      />
      <Text tone="quiet">
        {ownStart === null
          ? `Of the rated ${formatQuantity(bank.ratedAh, 'Ah')}.`
          : `Of the rated ${formatQuantity(bank.ratedAh, 'Ah')}; ${formatPercent(ownStart, 1)} of what the bank held at its own start.`}
      </Text>
      <Quiet>{conventionSentence}</Quiet>
      <Disclosure label="How the state of health was computed">
        <FormulaLines lines={sohLines(computedCase)} />
      </Disclosure>
    </Stack>
  );
}

function CyclesPart({ computedCase }: PartProps) {
  const { efc, efcFromCounter, efcFromDepth, efcDisagreement } = computedCase.computed;
  const isFlagged = efcDisagreement !== null && Math.abs(efcDisagreement) > flaggedDisagreement;
  const way = efcFromCounter === null ? 'From depth, cycles a day and days' : 'By the counter';
  return (
    <Stack gap="s">
      <FigureLine title="Full cycles since new" value={formatNumber(efc, { decimals: 0 })} />
      <Text tone={isFlagged ? 'rust' : 'quiet'}>
        {efcDisagreement === null || efcFromDepth === null
          ? `${way}. There is no second way to hold it against.`
          : `${way}; depth, cycles a day and days come to ${formatNumber(efcFromDepth, { decimals: 0 })}. Since the previous check the two are ${formatPercent(Math.abs(efcDisagreement))} apart${isFlagged ? ', more than rounding explains. Check the counter, the depth and the cycles a day.' : ', within what typed depths allow.'}`}
      </Text>
      <Disclosure label="How the full cycles were computed">
        <FormulaLines lines={cycleLines(computedCase)} />
        <Text>
          {`Charge discharged since new over the rated capacity. Two ways that differ by more than ${formatPercent(flaggedDisagreement)} are flagged (judgement: depths are typed to the nearest 5 or 10 %).`}
        </Text>
      </Disclosure>
    </Stack>
  );
}

const styles = StyleSheet.create({
  line: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'space-between',
    alignItems: 'baseline',
    columnGap: space.l,
  },
});
