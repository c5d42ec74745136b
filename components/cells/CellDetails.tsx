import { memo, useDeferredValue, useMemo, useState } from 'react';
import { View } from 'react-native';

import { FadeChart, type FadeUnit } from '@/components/charts';
import { pageAtUse } from '@/components/chosenUse/atUse';
import { UseSentence } from '@/components/chosenUse/UseSentence';
import { UseSliders } from '@/components/chosenUse/UseSliders';
import type { ChosenUse } from '@/components/chosenUse/useChosenUse';
import { useLayout } from '@/components/theme';
import { Banner, Beside, Heading, Lead, Panel, Quiet, Segmented, Stack } from '@/components/ui';
import type { CellPage, Use } from '@/lib/contract/cells';

import { BandFilter } from './BandFilter';
import { CellReadouts } from './CellReadouts';
import { ClaimsTable } from './ClaimsTable';
import { Evidence } from './Evidence';
import { fadeChartData, leastX, rawChecks } from './fadeChartData';
import { HowComputed } from './HowComputed';
import { lifeInShort } from './lifeWords';
import { waitingSentence } from './poolWords';
import { RelatedCells } from './RelatedCells';
import { SurvivalPart } from './SurvivalPart';
import { WhatMovesIt } from './WhatMovesIt';

interface CellDetailsProps {
  page: CellPage;
  chosen: ChosenUse;
  onBandChange: (band: string | undefined) => void;
  /** The figures of another band are on their way. */
  isUpdating: boolean;
}

/** A cell type's figures at the use chosen. What does not move with the use is kept from being drawn again. */
export function CellDetails({ page: standard, chosen, onBandChange, isUpdating }: CellDetailsProps) {
  const { isWide } = useLayout();
  const { use } = chosen;
  const page = useMemo(() => pageAtUse(standard, use), [standard, use]);
  // Curve, life and sentence move at once; tables and words follow when there is time.
  const later = useDeferredValue(page);
  const band = page.bands.find(({ key }) => key === page.band);
  const sentence = band ? (
    <Lead tone="ink">{bandSentence(band.label)}</Lead>
  ) : (
    <UseSentence chosen={chosen} />
  );
  const sliders = !band && page.model && page.view.life && <Conditions page={page} chosen={chosen} />;
  const waiting = waitingSentence(page.pool);
  return (
    <Beside
      aside={
        <Stack gap="xl">
          {isWide && sentence}
          {isWide && sliders}
          <StillWhatMovesIt effects={standard.effects} />
          <StillEvidence page={later} />
          {waiting && (
            <Banner kind="info" title="Waiting to be published">
              {waiting}
            </Banner>
          )}
        </Stack>
      }
    >
      <CellReadouts page={page} />
      {!isWide && sentence}
      {page.view.life && (
        <View aria-busy={isUpdating}>
          <FadePart page={page} standard={standard} />
        </View>
      )}
      {!isWide && sliders}
      {!band && <StillClaims page={later} />}
      {!band && <StillSurvival page={standard} />}
      <StillBandFilter page={standard} onChange={onBandChange} />
      {!band && <StillRelated page={later} />}
    </Beside>
  );
}

const StillWhatMovesIt = memo(WhatMovesIt);
const StillClaims = memo(ClaimsTable);
const StillEvidence = memo(Evidence);
const StillRelated = memo(RelatedCells);
const StillSurvival = memo(SurvivalPart);
const StillBandFilter = memo(BandFilter);

/** A band is looked at by itself, beside the model: cycles alone, at the full cycles of the standard use. */
const bandSentence = (label: string) =>
  `Only banks with ${label}: a single curve through their readings, by full cycles alone, at 60 % once a day. Lives at a use are the pooled model’s, without a band.`;

function Conditions({ page, chosen }: { page: CellPage; chosen: ChosenUse }) {
  const setUse = (use: Use) => chosen.setUse(use);
  return (
    <Panel label="Move the conditions">
      <Heading level={2} size="lead">
        Move the conditions
      </Heading>
      <Quiet tone="ink" aria-live="polite">
        {page.view.life && lifeInShort(page.view.life)}
      </Quiet>
      <UseSliders use={chosen.use} onChange={setUse} />
    </Panel>
  );
}

const axes: { value: FadeUnit; label: string }[] = [
  { value: 'years', label: 'Years' },
  { value: 'efc', label: 'Full cycles' },
  { value: 'energy', label: 'Energy' },
];

function FadePart({ page, standard }: { page: CellPage; standard: CellPage }) {
  const [axis, setAxis] = useState<FadeUnit>('years');
  const band = page.bands.find(({ key }) => key === page.band);
  // The checks and the span of the axis stay as they are while the use moves the curve.
  const raw = useMemo(() => rawChecks(standard, axis), [standard, axis]);
  const least = useMemo(() => leastX(standard, axis), [standard, axis]);
  const drawn = useMemo(() => fadeChartData(page, axis), [page, axis]);
  return (
    <FadeChart
      title={`Fade of ${page.cellType.name}${band ? `, ${band.label}` : ''}`}
      {...raw}
      {...drawn}
      leastX={least}
      controls={<Segmented label="Along" value={axis} onChange={setAxis} options={axes} />}
      computed={<HowComputed isBand={band !== undefined} />}
    />
  );
}
