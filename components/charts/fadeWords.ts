import { formatCount, formatNumber, formatPercent, formatRange } from '@/lib/units';
import { endOfLifeFraction, type FadeClaim, type FadePoint, type FadeStatus } from './fadeSeries';

export type FadeUnit = 'years' | 'efc';

export interface FadeLife {
  estimate: number;
  lower: number;
  upper: number;
  status: FadeStatus;
}

/** Ends of the range within which 8 of 10 banks cross 80 %. */
export interface FadeBanks {
  lower: number;
  upper: number;
}

/** "7.4 y", "1,240 EFC". */
export const fadeX = (x: number, unit: FadeUnit): string =>
  unit === 'years'
    ? `${formatNumber(x, { decimals: x < 10 ? 1 : 0 })} y`
    : `${formatCount(Math.round(x / 10) * 10)} EFC`;

const fadeRange = (lower: number, upper: number, unit: FadeUnit): string =>
  unit === 'years'
    ? `${formatRange(lower, upper, { decimals: 0 })} y`
    : `${formatRange(Math.round(lower / 10) * 10, Math.round(upper / 10) * 10, { decimals: 0 })} EFC`;

/** A point's reading in words; extrapolated parts have a range only. */
export function fadeReading(point: FadePoint, unit: FadeUnit): string {
  const range = `${formatRange(point.lower * 100, point.upper * 100, { decimals: 0 })} %`;
  const left =
    point.status === 'extrapolated' ? `${range} left` : `${formatPercent(point.soh)} left, range ${range}`;
  return `At ${fadeX(point.x, unit)}: ${left}, ${point.status}`;
}

/** The direct label at the curve's crossing of 80 %. */
export function lifeLabel(life: FadeLife, unit: FadeUnit): string {
  const words =
    life.status === 'extrapolated' ? fadeRange(life.lower, life.upper, unit) : fadeX(life.estimate, unit);
  return `${words} to 80 %, ${life.status}`;
}

/** The direct label of the range of banks. */
export const banksLabel = ({ lower, upper }: FadeBanks, unit: FadeUnit): string =>
  `8 of 10 banks: ${fadeRange(lower, upper, unit)}`;

/** The whole chart for those who do not see it. */
export function fadeSummary({
  title,
  curve,
  checkCount,
  reachX,
  life,
  banks = null,
  claims,
  unit,
}: {
  title: string;
  curve: readonly FadePoint[];
  checkCount: number;
  reachX: number | null;
  life: FadeLife | null;
  banks?: FadeBanks | null;
  claims: readonly FadeClaim[];
  unit: FadeUnit;
}): string {
  const atReach = reachX === null ? undefined : curve.filter((point) => point.x <= reachX).at(-1);
  const sentences = [
    `${title}, against ${unit === 'years' ? 'years since new' : 'equivalent full cycles since new'}.`,
    `${formatCount(checkCount)} single checks.`,
    reachX !== null && `Readings reach ${fadeX(reachX, unit)}.`,
    atReach && `${fadeReading(atReach, unit)}.`,
    life
      ? `${lifeLabel(life, unit)}, 90 % range ${fadeRange(life.lower, life.upper, unit)}.`
      : `No figure is given for ${formatPercent(endOfLifeFraction)}.`,
    banks && `${banksLabel(banks, unit)} to 80 %.`,
    ...claims.map((claim) => `${claim.label}: ${fadeX(claim.x, unit)}.`),
  ];
  return sentences.filter(Boolean).join(' ');
}
