import { Banner, EmptyState, Readout, Readouts, Stack, Strong } from '@/components/ui';
import type { CellPage, Life } from '@/lib/contract/cells';
import { formatCount, formatNumber, formatQuantity, formatRange } from '@/lib/units';

import { carriedClaims } from './cellWords';
import { lifeFigure, outsideSentence, toldOf } from './lifeWords';
import { absenceWords } from './poolWords';

/** The three figures at the head: measured, projected, quoted; or why there is none. */
export function CellReadouts({ page }: { page: CellPage }) {
  const { view } = page;
  if (!view.life) {
    const { short, long } = absenceWords[view.absence ?? 'noFit'];
    return <EmptyState title={`No life shown: ${short}`}>{long}</EmptyState>;
  }
  return (
    <Stack gap="m">
      {view.life.basis === 'pool' && (
        <Banner kind="info" title="The pool’s figures, not this cell type’s own">
          {poolWords(page)}
        </Banner>
      )}
      {view.life.outside.length > 0 && (
        <Banner kind="caution" title="Outside the pool">
          {outsideSentence(view.life.outside)}
        </Banner>
      )}
      <Readouts>
        <LeftAtReach life={view.life} />
        <YearsToEighty life={view.life} />
        {view.life.basis !== 'band' && <ShareOfLabel page={page} />}
      </Readouts>
    </Stack>
  );
}

function poolWords({ view: { evidence } }: CellPage): string {
  const few = evidence
    ? `${formatCount(evidence.banks)} banks stand behind this cell type, fewer than 10`
    : 'Fewer than 5 owners have sent checks of this cell type';
  return `${few}: what stands here is the figure over all cell types, with its wider range.`;
}

function LeftAtReach({ life }: { life: Life }) {
  const { estimate, lower, upper } = life.leftAtReachFraction;
  const reach = formatQuantity(life.reachYears, 'years', { decimals: 1 });
  const range = formatRange(lower * 100, upper * 100, { decimals: 0 });
  return (
    <Readout value={formatNumber(estimate * 100, { decimals: 0 })} unit="%">
      left at {reach}, <Strong size="small">measured</Strong>; 90 % range {range} %
    </Readout>
  );
}

const silent = {
  beyond: 'years to 80 % lie beyond what the readings can say',
  outside: 'no years to 80 %: the pool does not reach this use',
  notMeasured: 'years to 80 %: not measured yet',
} as const;

function YearsToEighty({ life }: { life: Life }) {
  const told = toldOf(life);
  if (told !== 'figure' && told !== 'range')
    return (
      <Readout value="–" unit="" tone="quiet">
        {silent[told]}
      </Readout>
    );
  const { value, range } = lifeFigure(life);
  const { rangeOfBanks } = life;
  return (
    <Readout value={value} unit="y" tone="tide">
      to 80 %,{' '}
      <Strong size="small" tone="tide">
        {life.status}
      </Strong>
      {range && `; 90 % range ${range} y`}
      {rangeOfBanks &&
        `; 8 of 10 banks ${formatRange(rangeOfBanks.lower, rangeOfBanks.upper, { decimals: 0 })} y`}
      {life.support === 'leans' && '; leans on published studies'}
    </Readout>
  );
}

function ShareOfLabel({ page: { claims, view } }: { page: CellPage }) {
  const claim = carriedClaims(claims)[0];
  if (!claim)
    return claims.length === 0 ? null : (
      <Readout value="–" unit="" tone="brass">
        the{' '}
        <Strong size="small" tone="brass">
          label
        </Strong>{' '}
        does not state its conditions
      </Readout>
    );
  const { ratio, impliedYears } = claim.label;
  // A ratio is of a life that is told as a number.
  if (!ratio || !view.life || toldOf(view.life) === 'beyond')
    return (
      <Readout value={formatNumber(impliedYears.estimate, { decimals: 0 })} unit="y" tone="brass">
        is what the{' '}
        <Strong size="small" tone="brass">
          label
        </Strong>{' '}
        implies here
      </Readout>
    );
  return (
    <Readout value={formatNumber(ratio.estimate * 100, { decimals: 0 })} unit="%" tone="brass">
      of what the{' '}
      <Strong size="small" tone="brass">
        label
      </Strong>{' '}
      implies here, 90 % range {formatRange(ratio.lower * 100, ratio.upper * 100, { decimals: 0 })} %
    </Readout>
  );
}
