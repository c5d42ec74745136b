import { useRouter } from 'expo-router';
import { useEffect, useMemo, useState } from 'react';

import { publishedFitOf } from '@/components/chosenUse/publishedModel';
import { useLayout } from '@/components/theme';
import { Beside, Button, Quiet, Row, ScreenOnly, Segmented, Stack, Text } from '@/components/ui';
import type { CellEntry } from '@/lib/contract/cells';
import type { PublicModel } from '@/lib/contract/model';
import type { PublishedFit } from '@/lib/fit/pooled/published';

import { FixturePart } from './FixturePart';
import { addressOfPlans } from './planAddress';
import { PlanComparison } from './PlanComparison';
import { PlanComputed } from './PlanComputed';
import { PlanFields } from './PlanFields';
import { defaultPlan, type PlanText } from './planForm';
import { isTold, PlanAnswer, PlanDetails } from './PlanResults';
import { SizePart } from './SizePart';
import { usePlan, type ReadyPlan } from './usePlan';

const addressDelayMs = 400;

interface PlanViewProps {
  model: PublicModel;
  cells: readonly CellEntry[];
  startsWith: PlanText[];
}

/** One plan, or two side by side; what is typed stands in the address. */
export function PlanView({ model, cells, startsWith }: PlanViewProps) {
  const { isWide } = useLayout();
  const fit = useMemo(() => publishedFitOf(model), [model]);
  const [plans, setPlans] = useState(startsWith);
  const [place, setPlace] = useState(0);
  useAddress(plans);
  const [first = defaultPlan, second] = plans;
  const text = plans[place] ?? first;
  const { ready, isStale } = useLastPlan(fit, text);
  // Stable, as the fields subscribe to it.
  const change = useMemo(
    () => (plan: PlanText) => setPlans((all) => all.map((one, index) => (index === place ? plan : one))),
    [place],
  );
  const fields = (
    <ScreenOnly>
      <Stack gap="xl">
        {second && (
          <Segmented
            label="Plan to change"
            value={String(place)}
            onChange={(value) => setPlace(Number(value))}
            options={[
              { value: '0', label: 'Plan 1' },
              { value: '1', label: 'Plan 2' },
            ]}
          />
        )}
        <PlanFields
          key={place}
          plan={text}
          onChange={change}
          cellTypes={cells.map(({ cellType }) => cellType)}
        />
        {second ? (
          <Button
            label="Drop plan 2"
            onPress={() => {
              setPlace(0);
              setPlans([first]);
            }}
          />
        ) : (
          <Button
            label="Set a second plan beside it"
            onPress={() => {
              setPlans([first, first]);
              setPlace(1);
            }}
          />
        )}
      </Stack>
    </ScreenOnly>
  );
  const answer = ready ? (
    <Stack>
      {isStale && <Text tone="rust">Some fields can’t be read; this is the answer before.</Text>}
      {ready.isStandIn && <Text>Too few owners of this cell type yet: the pool’s average stands in.</Text>}
      <PlanAnswer plan={ready.plan} currency={ready.choices.currency} />
    </Stack>
  ) : (
    <Text>Some fields can’t be read yet; each says why.</Text>
  );
  const rest = (
    <>
      {ready && isTold(ready.plan) && <PlanBehind fit={fit} ready={ready} />}
      {second && <PlanComparison fit={fit} texts={[first, second]} />}
      <PlanComputed />
      <Quiet>
        Volunteers’ banks are not an experiment, and no sudden drop late in life is modelled. Work on a bank
        belongs to people who know it: the maker’s instructions and local codes come first.
      </Quiet>
    </>
  );
  // On a phone the answer is on the first screen and the fields right below it.
  return isWide ? (
    <Beside side="start" asideWidth={400} aside={fields}>
      {answer}
      {rest}
    </Beside>
  ) : (
    <Stack gap="xl">
      {answer}
      {fields}
      {rest}
    </Stack>
  );
}

function PlanBehind({ fit, ready }: { fit: PublishedFit; ready: ReadyPlan }) {
  const { plan, choices, cellType } = ready;
  return (
    <>
      <PlanDetails plan={plan} currency={choices.currency} />
      <SizePart fit={fit} choices={choices} cellType={cellType} plan={plan} />
      <FixturePart choices={choices} plan={plan} />
      <ScreenOnly>
        <Row>
          <Button label="Print this plan" onPress={() => window.print()} />
        </Row>
      </ScreenOnly>
    </>
  );
}

/** The plan as typed, or the last one that could be read. */
function useLastPlan(fit: PublishedFit, text: PlanText): { ready: ReadyPlan | null; isStale: boolean } {
  const ready = usePlan(fit, text);
  const [last, setLast] = useState(ready);
  if (ready && ready !== last) setLast(ready);
  return { ready: ready ?? last, isStale: ready === null };
}

/** Keeps the address in step with the plans, a moment after the last key. */
function useAddress(plans: readonly PlanText[]): void {
  const router = useRouter();
  useEffect(() => {
    const timer = setTimeout(() => router.setParams(addressOfPlans(plans)), addressDelayMs);
    return () => clearTimeout(timer);
  }, [plans, router]);
}
