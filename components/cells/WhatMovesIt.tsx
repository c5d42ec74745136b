import { View } from 'react-native';

import { EffectBar, type GaugeScale, Heading, Quiet, Stack } from '@/components/ui';
import type { LeverEffect } from '@/lib/contract/effects';

import { changeWords, effectNote, leverName, ratioWords, verdictWords } from './effectWords';

/** What each lever does to a life, over the whole pool, on one scale of ratios. */
export function WhatMovesIt({ effects }: { effects: readonly LeverEffect[] }) {
  if (effects.length === 0) return null;
  const scale = ratioScale(effects);
  return (
    <Stack gap="xs">
      <Heading level={2}>What moves it</Heading>
      <Quiet>
        Change in years to 80 %, all else equal, over all cell types: at 70 % depth, 0.2 It and 25 °C,
        clamping above 0.3 It at 90 %, 0.5 It and 33 °C. Bars are 90 % ranges, the tall mark is no change.
        Depth is changed at the same full cycles a year.
      </Quiet>
      <View>
        {effects.map((effect) => (
          <EffectRow key={effect.lever} effect={effect} scale={scale} />
        ))}
      </View>
    </Stack>
  );
}

function EffectRow({ effect, scale }: { effect: LeverEffect; scale: GaugeScale }) {
  const { ratio, verdict } = effect;
  const [name, change, words] = [leverName(effect), changeWords(effect), verdictWords(effect)];
  const figure = ratioWords(effect);
  const note = effectNote(effect);
  return (
    <EffectBar
      scale={scale}
      name={name}
      change={change}
      verdict={words}
      figure={figure}
      ratio={
        verdict === 'notMeasured'
          ? undefined
          : { estimate: ratio.estimate, low: ratio.lower, high: ratio.upper }
      }
      isShown={verdict === 'shown'}
      note={note}
      summary={[`${name}, ${change}: ${words}`, figure && `life ${figure}`, note].filter(Boolean).join('; ')}
    />
  );
}

/** Symmetrical about no change, and wide enough for every range that is drawn. */
function ratioScale(effects: readonly LeverEffect[]): GaugeScale {
  const drawn = effects.filter(({ verdict }) => verdict !== 'notMeasured');
  const farthest = Math.max(1.15, ...drawn.flatMap(({ ratio }) => [ratio.upper, 1 / ratio.lower]));
  const max = farthest * 1.04;
  return { min: 1 / max, max, isLog: true };
}
