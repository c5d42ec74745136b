import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { View } from 'react-native';

import { QueryView } from '@/components/QueryView';
import {
  Button,
  Heading,
  LoadingState,
  Quiet,
  Segmented,
  SkeletonRows,
  Slider,
  Stack,
  Text,
} from '@/components/ui';
import { whatIfQuery } from '@/lib/client/standing';
import type { Standing, WhatIf, WhatIfLever } from '@/lib/contract/standing';
import { formatPercent, formatQuantity } from '@/lib/units';

import { WhatIfAnswerView } from './WhatIfAnswerView';

type Tried = Partial<Record<WhatIfLever['condition'], number>> & { isClamped?: boolean };

const levers: Record<WhatIfLever['condition'], { label: string; show: (value: number) => string }> = {
  depthFraction: { label: 'Depth of a typical day', show: (value) => formatPercent(value) },
  temperatureC: {
    label: 'Mean cell temperature',
    show: (value) => formatQuantity(value, '°C', { decimals: 0 }),
  },
  socMeanFraction: { label: 'Mean charge level', show: (value) => formatPercent(value) },
  dischargeIt: {
    label: 'Mean discharge rate',
    show: (value) => formatQuantity(value, 'It', { decimals: 2 }),
  },
};

const pauseMs = 250;

/** The value a moment after it was last changed, so that a slider on its way asks for nothing. */
function useSettled<Value>(value: Value): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), pauseMs);
    return () => clearTimeout(timer);
  }, [value]);
  return settled;
}

/** Levers to try: what another use would do to the bank's whole life, by the pool's measured effects. */
export function WhatIfPart({ bankId, standing }: { bankId: string; standing: Standing }) {
  const [tried, setTried] = useState<Tried>({});
  const { use } = standing;
  if (!use || standing.state !== 'ready' || standing.levers.length === 0) return null;
  const isTrying = Object.keys(tried).length > 0;
  return (
    <Stack gap="m">
      <Heading>What if</Heading>
      <Quiet>
        Move a lever: what it would do to years to 80 %, all else as this bank lives, by what the pool
        measured. Whole lives are compared: what is lost stays lost, so a bank some years old gains less. A
        lower charge limit acts by a lower mean charge level. Depth is moved at the same full cycles a year.
      </Quiet>
      {standing.levers.map(({ condition, value, ...range }) => (
        <Slider
          key={condition}
          {...levers[condition]}
          {...range}
          value={tried[condition] ?? value}
          note={tried[condition] === undefined ? 'as it is' : undefined}
          onChange={(chosen) => setTried({ ...tried, [condition]: chosen })}
        />
      ))}
      <Text weight="strong">Clamping</Text>
      <Segmented
        label="Clamping"
        value={(tried.isClamped ?? use.isClamped) ? 'clamped' : 'not'}
        onChange={(choice) => setTried({ ...tried, isClamped: choice === 'clamped' })}
        options={[
          { value: 'not', label: use.isClamped ? 'Not clamped' : 'Not clamped, as it is' },
          { value: 'clamped', label: use.isClamped ? 'Clamped, as it is' : 'Clamped' },
        ]}
      />
      {isTrying && <Answer bankId={bankId} tried={tried} onReset={() => setTried({})} />}
    </Stack>
  );
}

function Answer({ bankId, tried, onReset }: { bankId: string; tried: Tried; onReset: () => void }) {
  const query = useQuery(whatIfQuery(bankId, useSettled(tried) as WhatIf));
  return (
    <Stack gap="s">
      <View aria-live="polite" aria-busy={query.isPlaceholderData}>
        <QueryView
          query={query}
          loading={
            <LoadingState label="Working it out">
              <SkeletonRows count={2} height={48} />
            </LoadingState>
          }
        >
          {(answer) => <WhatIfAnswerView answer={answer} />}
        </QueryView>
      </View>
      <Button label="Back to how it is" onPress={onReset} />
    </Stack>
  );
}
