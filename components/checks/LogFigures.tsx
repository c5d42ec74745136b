import { type Definition, DefinitionList } from '@/components/ui';
import type { LogResult } from '@/lib/contract/uploads';
import { formatDuration, formatNumber, formatQuantity } from '@/lib/units';

const pair = (from: number | null, to: number | null, unit: string, decimals: number): string | null =>
  from === null || to === null
    ? null
    : `${formatNumber(from, { decimals })} → ${formatQuantity(to, unit, { decimals })}`;

const one = (label: string, value: string | null): Definition[] => (value === null ? [] : [{ label, value }]);

/** What a log comes to, of the whole bank; what it does not hold is left out. */
export function LogFigures({ result, ratedAh }: { result: LogResult; ratedAh: number }) {
  const { energyWh, meanTemperatureC, meanCurrentA } = result;
  const items: Definition[] = [
    { label: 'Charge', value: formatQuantity(result.capacityAh, 'Ah', { decimals: 1 }), strong: true },
    ...one('Energy', energyWh === null ? null : formatQuantity(energyWh / 1000, 'kWh', { decimals: 2 })),
    {
      label: 'Mean current',
      value: `${formatQuantity(meanCurrentA, 'A', { decimals: 1 })}, ${formatQuantity(meanCurrentA / ratedAh, 'It', { decimals: 2 })}`,
    },
    { label: 'Duration', value: formatDuration(result.durationS) },
    ...one('Bank voltage', pair(result.startVoltageV, result.endVoltageV, 'V', 1)),
    ...one('Cells, start to end', pair(result.startTemperatureC, result.endTemperatureC, '°C', 1)),
    ...one(
      'Cells, mean',
      meanTemperatureC === null ? null : formatQuantity(meanTemperatureC, '°C', { decimals: 1 }),
    ),
    ...one('Cells at full', pair(result.lowestCellAtFullV, result.highestCellAtFullV, 'V', 2)),
    ...one('Cells at end', pair(result.lowestCellAtEndV, result.highestCellAtEndV, 'V', 2)),
  ];
  return <DefinitionList items={items} figures columns={2} />;
}
