import { formatCount, formatNumber, formatPercent, formatRange } from '@/lib/units';
import { endOfLifeFraction, type FadeClaim, type FadePoint, type FadeStatus } from './fadeSeries';

/** Along what a fade is drawn: age, full cycles, or the energy a cell has delivered (kWh). */
export type FadeUnit = 'years' | 'efc' | 'energy';

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

const rounded = (x: number, unit: FadeUnit): number =>
  unit === 'efc' ? Math.round(x / 10) * 10 : unit === 'energy' ? Number(x.toPrecision(3)) : x;

const unitWords = { years: 'y', efc: 'EFC', energy: 'kWh per cell' } as const;

/** "7.4 y", "1,240 EFC", "952 kWh per cell". */
export const fadeX = (x: number, unit: FadeUnit): string =>
  unit === 'years'
    ? `${formatNumber(x, { decimals: x < 10 ? 1 : 0 })} y`
    : `${formatCount(rounded(x, unit))} ${unitWords[unit]}`;

const fadeRange = (lower: number, upper: number, unit: FadeUnit): string =>
  `${formatRange(rounded(lower, unit), rounded(upper, unit), { decimals: 0 })} ${unitWords[unit]}`;

const axisWords = {
  years: 'years since new',
  efc: 'equivalent full cycles (EFC) since new',
  energy: 'energy delivered since new, kWh per cell',
} as const;

/** The level axis's title. */
export const fadeAxisTitle = (unit: FadeUnit): string => axisWords[unit];

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

/** "13 y, projected, 90 % range 11 to 15 y"; the range alone where it is extrapolated. */
const lifeWords = ({ estimate, lower, upper, status }: FadeLife, unit: FadeUnit): string =>
  status === 'extrapolated'
    ? `${fadeRange(lower, upper, unit)}, extrapolated (90 % range)`
    : `${fadeX(estimate, unit)}, ${status}, 90 % range ${fadeRange(lower, upper, unit)}`;

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
    `${title}: capacity left, against ${axisWords[unit]}.`,
    checkCount === 0 ? 'No single checks are drawn.' : `${formatCount(checkCount)} single checks are drawn.`,
    reachX !== null && `Readings reach ${fadeX(reachX, unit)}.`,
    atReach && `${fadeReading(atReach, unit)}.`,
    life
      ? `The curve falls to 80 % at ${lifeWords(life, unit)}.`
      : `No figure is given for the fall to ${formatPercent(endOfLifeFraction)}.`,
    banks && `8 of 10 banks fall to 80 % within ${fadeRange(banks.lower, banks.upper, unit)}.`,
    ...claims.map((claim) => `By ${claim.label} it would be at ${fadeX(claim.x, unit)}.`),
  ];
  return sentences.filter(Boolean).join(' ');
}
