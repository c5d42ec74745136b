import type { Use } from '@/lib/contract/cells';
import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

/** "cycled 60 % deep at 0.1 It, 1 time a day, near 25 °C, 50 % full on average, not clamped." */
export function wordsOfUse(use: Use): string {
  const often = use.cyclesPerDay === 1 ? 'once a day' : `${formatNumber(use.cyclesPerDay)} times a day`;
  const full = use.socMeanFraction === 0.5 ? 'half full' : `${formatPercent(use.socMeanFraction)} full`;
  return `cycled ${formatPercent(use.depthFraction)} deep at ${formatQuantity(use.dischargeIt, 'It')}, ${often}, near ${formatQuantity(use.temperatureC, '°C', { decimals: 0 })}, ${full} on average, ${use.isClamped ? 'clamped' : 'not clamped'}.`;
}
