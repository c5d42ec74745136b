import { useState } from 'react';
import { View } from 'react-native';

import { FadeChart } from '@/components/charts';
import { Banner, Beside, Lead, Segmented, Stack, Text } from '@/components/ui';
import type { CellPage } from '@/lib/contract/cells';

import { BandFilter } from './BandFilter';
import { CellReadouts } from './CellReadouts';
import { ClaimsTable } from './ClaimsTable';
import { type FadeAxis, fadeChartData } from './fadeChartData';
import { sentenceOfUse, waitingSentence } from './poolWords';

interface CellDetailsProps {
  page: CellPage;
  onBandChange: (band: string | undefined) => void;
  /** The figures of another band are on their way. */
  isUpdating: boolean;
}

export function CellDetails({ page, onBandChange, isUpdating }: CellDetailsProps) {
  const waiting = waitingSentence(page.pool);
  return (
    <Stack gap="xl">
      <CellReadouts page={page} />
      <Beside
        aside={
          <>
            <Lead tone="ink">{sentenceOfUse(page.use)}</Lead>
            <BandFilter page={page} onChange={onBandChange} />
            {waiting && (
              <Banner kind="info" title="Waiting to be published">
                {waiting}
              </Banner>
            )}
          </>
        }
      >
        {page.view.life && (
          <View aria-busy={isUpdating}>
            <FadePart page={page} />
          </View>
        )}
        <ClaimsTable page={page} />
      </Beside>
    </Stack>
  );
}

const axes: { value: FadeAxis; label: string }[] = [
  { value: 'years', label: 'Years' },
  { value: 'efc', label: 'Full cycles' },
];

function FadePart({ page }: { page: CellPage }) {
  const [axis, setAxis] = useState<FadeAxis>('years');
  const band = page.bands.find(({ key }) => key === page.band);
  return (
    <FadeChart
      title={`Fade of ${page.cellType.name}${band ? `, ${band.label}` : ''}`}
      {...fadeChartData(page, axis)}
      controls={<Segmented label="Along" value={axis} onChange={setAxis} options={axes} />}
      computed={<HowComputed />}
    />
  );
}

function HowComputed() {
  return (
    <Stack gap="s">
      <Text>
        Each circle is one approved capacity check, brought to 25 °C and 0.2 It. The line is the weighted
        least-squares curve of the capacity lost, q = k · nᶻ, over n equivalent full cycles; its range holds
        90 % of curves fitted again to banks drawn anew, so that the checks of one bank count together. Years
        are full cycles at the use stated.
      </Text>
      <Text>
        Readings reach to the 95 % quantile of the checks. Up to there the curve is measured, up to twice as
        far it is projected, up to three times extrapolated, and past that no figure is given. No sudden drop
        late in life is assumed, and banks that stopped reporting may have done worse.
      </Text>
    </Stack>
  );
}
