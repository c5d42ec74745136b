import { useState } from 'react';
import { View } from 'react-native';

import { FadeChart } from '@/components/charts';
import { Banner, Beside, Lead, Segmented, Stack } from '@/components/ui';
import type { CellPage } from '@/lib/contract/cells';

import { BandFilter } from './BandFilter';
import { CellReadouts } from './CellReadouts';
import { ClaimsTable } from './ClaimsTable';
import { type FadeAxis, fadeChartData } from './fadeChartData';
import { Evidence } from './Evidence';
import { HowComputed } from './HowComputed';
import { sentenceOfUse } from './lifeWords';
import { waitingSentence } from './poolWords';
import { WhatMovesIt } from './WhatMovesIt';

interface CellDetailsProps {
  page: CellPage;
  onBandChange: (band: string | undefined) => void;
  /** The figures of another band are on their way. */
  isUpdating: boolean;
}

export function CellDetails({ page, onBandChange, isUpdating }: CellDetailsProps) {
  const waiting = waitingSentence(page.pool);
  const band = page.bands.find(({ key }) => key === page.band);
  return (
    <Stack gap="xl">
      <Lead tone="ink">{band ? bandSentence(band.label) : sentenceOfUse(page.use)}</Lead>
      <CellReadouts page={page} />
      <Beside
        aside={
          <Stack gap="xl">
            <WhatMovesIt effects={page.effects} />
            <Evidence page={page} />
            {waiting && (
              <Banner kind="info" title="Waiting to be published">
                {waiting}
              </Banner>
            )}
          </Stack>
        }
      >
        {page.view.life && (
          <View aria-busy={isUpdating}>
            <FadePart page={page} />
          </View>
        )}
        {!band && <ClaimsTable page={page} />}
        <BandFilter page={page} onChange={onBandChange} />
      </Beside>
    </Stack>
  );
}

/** A band is looked at by itself, beside the model: cycles alone, at the full cycles of the standard use. */
const bandSentence = (label: string) =>
  `Only banks with ${label}: a single curve through their readings, by full cycles alone, at 60 % once a day. Lives at a use are the pooled model’s, without a band.`;

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
      computed={<HowComputed isBand={band !== undefined} />}
    />
  );
}
