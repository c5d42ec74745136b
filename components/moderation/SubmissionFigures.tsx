import { type Definition, DefinitionList } from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';
import { formatDuration, formatNumber, formatPercent, formatQuantity, formatUncertainty } from '@/lib/units';

import { originWord, proposedCapacityAh } from './submissionWords';

/** The reading as the owner gave it, with what was computed from it. */
export function SubmissionFigures({ submission }: { submission: Submission }) {
  const { fields, computed, bank } = submission;
  const { reading, conditions } = fields;
  const proposed = proposedCapacityAh(submission);
  const items: Definition[] = [
    {
      label: originWord(submission),
      value: formatQuantity(reading.capacityAh, 'Ah', { decimals: 1 }),
      tone: proposed === undefined ? 'ink' : 'rust',
      strong: true,
    },
    proposed === undefined
      ? {
          label: 'At 25 °C, 0.2 It',
          value: formatUncertainty(computed.capacityRefAh, computed.expandedAh, 'Ah'),
        }
      : { label: 'Likely meant', value: formatQuantity(proposed, 'Ah', { decimals: 1 }), strong: true },
    { label: 'Rated, bank', value: formatQuantity(bank.ratedAh, 'Ah', { decimals: 0 }) },
    { label: 'State of health', value: formatPercent(computed.sohFraction, 1) },
    { label: 'Energy', value: formatQuantity(reading.energyWh / 1000, 'kWh', { decimals: 2 }) },
    { label: 'Mean voltage', value: `${formatNumber(computed.meanCellV, { decimals: 3 })} V per cell` },
    {
      label: 'Discharge',
      value: `${formatQuantity(reading.meanCurrentA, 'A', { decimals: 1 })}, ${formatQuantity(computed.meanIt, 'It', { decimals: 2 })}`,
    },
    { label: 'Duration', value: formatDuration(reading.durationS) },
    {
      label: 'Cell temperature',
      value: `${formatNumber(reading.temperatureStartC, { decimals: 0 })} → ${formatQuantity(reading.temperatureEndC, '°C', { decimals: 0 })}`,
    },
    { label: 'Instrument', value: `${reading.instrument}, ${formatPercent(reading.gainErrorFraction, 1)}` },
    { label: 'Ended at', value: `${formatNumber(reading.lowestCellAtEndV, { decimals: 2 })} V lowest cell` },
    {
      label: 'Full at',
      value: `${formatNumber(reading.highestCellAtFullV, { decimals: 2 })} V highest cell`,
    },
    { label: 'Depth', value: formatPercent(conditions.depthFraction) },
    { label: 'Rate in use', value: formatQuantity(conditions.dischargeIt, 'It', { decimals: 2 }) },
    {
      label: conditions.temperatureOf === 'air' ? 'Air, mean of the year' : 'Cells, mean of the year',
      value: formatQuantity(conditions.temperatureMeanC, '°C', { decimals: 0 }),
    },
    { label: 'Full cycles', value: formatNumber(computed.efc, { decimals: 0 }) },
  ];
  return <DefinitionList items={items} figures columns={2} />;
}
