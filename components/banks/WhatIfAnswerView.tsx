import { View } from 'react-native';

import { changeWords, effectNote, leverName, ratioWords, verdictWords } from '@/components/cells/effectWords';
import { outsideSentence } from '@/components/cells/lifeWords';
import { EffectBar, type GaugeScale, Quiet, Text } from '@/components/ui';
import type { LeverEffect } from '@/lib/contract/effects';
import type { WhatIfAnswer } from '@/lib/contract/standing';

type Row = Pick<LeverEffect, 'ratio' | 'verdict'> & {
  key: string;
  name: string;
  change: string;
  note: string;
};

/** What changed conditions do to a life: each by itself, and together. */
export function WhatIfAnswerView({ answer: { effects, together, outside } }: { answer: WhatIfAnswer }) {
  if (outside.length > 0) return <Text>{outsideSentence(outside)}</Text>;
  if (effects.length === 0) return <Quiet>No change from how it is used now.</Quiet>;
  const rows: Row[] = effects.map((effect) => ({
    ...{ key: effect.lever, ratio: effect.ratio, verdict: effect.verdict },
    ...{ name: leverName(effect), change: changeOf(effect), note: effectNote(effect) },
  }));
  if (together && effects.length > 1)
    rows.push({ ...togetherRow(together, effects[0]!), ratio: together.ratio, verdict: together.verdict });
  const scale = scaleOf(rows);
  return (
    <View>
      {rows.map((row) => (
        <EffectRow key={row.key} row={row} scale={scale} />
      ))}
      {!together && <Quiet>Together: no figure, as one of them is not measured yet.</Quiet>}
    </View>
  );
}

const togetherRow = (together: NonNullable<WhatIfAnswer['together']>, like: LeverEffect) => ({
  ...{ key: 'together', name: 'Together', change: 'all at once' },
  note: effectNote({ ...like, ...together, evidence: null }),
});

/** "29 → 26 °C", "clamped → not clamped, below 0.3 It" */
function changeOf(effect: LeverEffect): string {
  const { to } = effect;
  if (typeof to !== 'boolean') return changeWords(rounded(effect));
  return `${to ? 'not clamped → clamped' : 'clamped → not clamped'}, ${changeWords(effect)}`;
}

/** A bank's own conditions are means with many digits. */
function rounded(effect: LeverEffect): LeverEffect {
  const digits = effect.lever === 'heat' ? 0 : 2;
  const round = (value: number | boolean) =>
    typeof value === 'number' ? Number(value.toFixed(digits)) : value;
  return { ...effect, from: round(effect.from), to: round(effect.to) };
}

function EffectRow({ row, scale }: { row: Row; scale: GaugeScale }) {
  const { name, change, ratio, verdict, note } = row;
  const [words, figure] = [verdictWords(row), ratioWords(row)];
  return (
    <EffectBar
      {...{ scale, name, change, figure, note, verdict: words }}
      ratio={
        verdict === 'notMeasured'
          ? undefined
          : { estimate: ratio.estimate, low: ratio.lower, high: ratio.upper }
      }
      isShown={verdict === 'shown'}
      summary={[`${name}, ${change}: ${words}`, figure && `life ${figure}`, note].filter(Boolean).join('; ')}
    />
  );
}

/** Symmetrical about no change. */
function scaleOf(rows: readonly Row[]): GaugeScale {
  const ends = rows.flatMap(({ ratio: { lower, upper } }) => [upper, 1 / lower]);
  const max = Math.max(1.25, ...ends) * 1.04;
  return { min: 1 / max, max, isLog: true };
}
