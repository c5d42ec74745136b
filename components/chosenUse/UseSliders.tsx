import { Segmented, Slider, Stack } from '@/components/ui';
import type { Use } from '@/lib/contract/cells';

import { depthWords, fullWords, heatWords, heldWords, oftenWords, rateWords } from './sentenceParts';

interface UseSlidersProps {
  use: Use;
  onChange: (use: Use) => void;
}

const round = (value: number) => Number(value.toPrecision(6));

/** The same use on sliders, for seeing how each condition moves a life. */
export function UseSliders({ use, onChange }: UseSlidersProps) {
  const set = (change: Partial<Use>) => onChange({ ...use, ...change });
  return (
    <Stack gap="m">
      <Slider
        {...{ label: 'Depth', min: 0.05, max: 1, step: 0.05, show: depthWords }}
        value={use.depthFraction}
        onChange={(depth) => set({ depthFraction: round(depth) })}
      />
      <Slider
        {...{ label: 'Rate', min: 0.02, max: 1, step: 0.02, show: rateWords }}
        value={use.dischargeIt}
        onChange={(rate) => set({ dischargeIt: round(rate) })}
      />
      <Slider
        {...{ label: 'How often', min: 0.1, max: 2, step: 0.1, show: oftenWords }}
        value={use.cyclesPerDay}
        onChange={(often) => set({ cyclesPerDay: round(often) })}
      />
      <Slider
        {...{ label: 'Temperature of the cells', min: 0, max: 45, step: 1, show: heatWords }}
        value={use.temperatureC}
        onChange={(heat) => set({ temperatureC: round(heat) })}
      />
      <Slider
        {...{ label: 'Mean charge level', min: 0.1, max: 0.95, step: 0.05, show: fullWords }}
        value={use.socMeanFraction}
        onChange={(full) => set({ socMeanFraction: round(full) })}
      />
      <Segmented
        label="Clamping"
        value={use.isClamped ? 'yes' : 'no'}
        onChange={(held) => set({ isClamped: held === 'yes' })}
        options={[
          { value: 'no', label: heldWords(false) },
          { value: 'yes', label: heldWords(true) },
        ]}
      />
    </Stack>
  );
}
