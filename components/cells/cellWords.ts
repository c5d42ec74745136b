import type { CellPage, Claim } from '@/lib/contract/cells';
import { formatCount, formatNumber, formatPercent, formatQuantity } from '@/lib/units';

const formats = { prismatic: 'Prismatic', cylindrical: 'Cylindrical', pouch: 'Pouch' } as const;

/** "Skerry Works · prismatic LFP, 240 Ah, 3.2 V · 61 banks of 58 owners, 248 checks" */
export function cellSubtitle({ cellType, view }: CellPage): string {
  const rating = formatQuantity(cellType.ratedAh, 'Ah', { decimals: 0 });
  const voltage = formatQuantity(cellType.nominalV, 'V', { decimals: 1 });
  const what = `${formats[cellType.format]} LFP by ${cellType.maker}, ${rating}, ${voltage}`;
  if (!view.evidence) return what;
  const { banks, owners, checks } = view.evidence;
  return `${what} · ${formatCount(banks)} banks of ${formatCount(owners)} owners, ${formatCount(checks)} checks`;
}

const rate = (it: number) => formatQuantity(it, 'It', { decimals: it < 0.1 ? 2 : 1 });

/**
 * "100 % deep, charged at 0.5 It, discharged at 0.5 It, 25 °C, clamped"; says where others are not stated, and none of
 * them is left out of what counts as whole.
 */
export function claimConditions(claim: Claim): string {
  const { depthFraction, chargeIt, dischargeIt, temperatureC, clamping } = claim;
  const stated = [
    depthFraction !== null && `${formatPercent(depthFraction)} deep`,
    chargeIt !== null && `charged at ${rate(chargeIt)}`,
    dischargeIt !== null && `discharged at ${rate(dischargeIt)}`,
    temperatureC !== null && formatQuantity(temperatureC, '°C', { decimals: 0 }),
    clamping === 'clamped' && 'clamped',
    clamping === 'none' && 'not clamped',
  ].filter((part) => part !== false);
  const isWhole =
    [depthFraction, chargeIt, dischargeIt, temperatureC].every((value) => value !== null) &&
    clamping !== 'notStated';
  if (stated.length === 0) return 'conditions not stated';
  return isWhole ? stated.join(', ') : `${stated.join(', ')}; others not stated`;
}

/** "5,200 cycles to 80 %" */
export const claimWords = ({ cycles, endOfLifeFraction }: Claim): string =>
  `${formatNumber(cycles, { decimals: 0 })} cycles to ${formatPercent(endOfLifeFraction)}`;

/** The claims that say enough to be carried to the use. */
export const carriedClaims = (claims: readonly Claim[]) =>
  claims.flatMap((claim) => (claim.label ? [{ ...claim, label: claim.label }] : []));

/** What a claim is called on a chart: by its cycles where there are several. */
export const claimLabel = ({ cycles }: Claim, count: number): string =>
  count > 1 ? `label, ${formatNumber(cycles, { decimals: 0 })} cycles` : 'the label, at this use';
