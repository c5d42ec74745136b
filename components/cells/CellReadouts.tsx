import { EmptyState, Readout, Readouts, Strong } from '@/components/ui';
import type { CellPage, Life } from '@/lib/contract/cells';
import { formatNumber, formatQuantity, formatRange } from '@/lib/units';

import { absenceWords, lifeFigure } from './poolWords';
import { quotedYears } from './quotedLife';

/** The three figures at the head: measured, projected, quoted; or why there is none. */
export function CellReadouts({ page }: { page: CellPage }) {
  const { view, claims, use } = page;
  if (!view.life) {
    const { short, long } = absenceWords[view.absence ?? 'noFit'];
    return <EmptyState title={`No life shown: ${short}`}>{long}</EmptyState>;
  }
  const quoted = claims[0] && quotedYears(claims[0], use);
  return (
    <Readouts>
      <LeftAtReach life={view.life} />
      <YearsToEighty life={view.life} />
      {quoted !== undefined && (
        <Readout value={formatNumber(quoted, { decimals: 0 })} unit="y" tone="brass">
          would come of the <Strong tone="brass">label</Strong>, cycles alone
        </Readout>
      )}
    </Readouts>
  );
}

function LeftAtReach({ life }: { life: Life }) {
  const { estimate, lower, upper } = life.leftAtReachFraction;
  const reach = formatQuantity(life.reachYears, 'years', { decimals: 1 });
  const range = formatRange(lower * 100, upper * 100, { decimals: 0 });
  return (
    <Readout value={formatNumber(estimate * 100, { decimals: 0 })} unit="%">
      left at {reach}, <Strong size="small">measured</Strong>; 90 % range {range}
    </Readout>
  );
}

function YearsToEighty({ life }: { life: Life }) {
  if (!life.years)
    return (
      <Readout value="–" unit="" tone="quiet">
        years to 80 % lie beyond what the readings can say
      </Readout>
    );
  const { value, range } = lifeFigure(life);
  return (
    <Readout value={value} unit="y" tone="tide">
      to 80 %,{' '}
      <Strong size="small" tone="tide">
        {life.status}
      </Strong>
      {range && `; 90 % range ${range}`}
    </Readout>
  );
}
