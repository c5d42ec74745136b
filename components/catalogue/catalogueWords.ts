import type {
  CatalogueEntry,
  CatalogueClaim,
  CataloguePage,
  CellTypeStatus,
  ClaimCondition,
} from '@/lib/contract/catalogue';
import { formatCount, formatNumber, formatPercent, formatQuantity } from '@/lib/units';

export const statusWords: Record<CellTypeStatus, string> = {
  proposed: 'proposed',
  listed: 'listed',
  declined: 'declined',
  merged: 'merged',
};

export const formatWords: Record<CatalogueEntry['format'], string> = {
  prismatic: 'prismatic',
  cylindrical: 'cylindrical',
  pouch: 'pouch',
};

export const counted = (count: number, one: string, many: string) =>
  `${formatCount(count)} ${count === 1 ? one : many}`;

/** "3 banks with 12 checks" */
export const dependentsWords = ({ banks, checks }: Pick<CatalogueEntry, 'banks' | 'checks'>) =>
  `${counted(banks, 'bank', 'banks')} with ${counted(checks, 'check', 'checks')}`;

export const fullName = ({ maker, name }: Pick<CatalogueEntry, 'maker' | 'name'>) => `${maker} ${name}`;

/** A rating with the digits that it has. */
export const ahWords = (ratedAh: number) =>
  formatQuantity(ratedAh, 'Ah', { decimals: Number.isInteger(ratedAh) ? 0 : 1 });

/** "280 Ah, 3.2 V, prismatic" */
export const ratingWords = ({
  ratedAh,
  nominalV,
  format,
}: Pick<CatalogueEntry, 'ratedAh' | 'nominalV' | 'format'>) =>
  [ahWords(ratedAh), formatQuantity(nominalV, 'V', { decimals: 2 }), formatWords[format]].join(', ');

export const conditionWords: Record<ClaimCondition, string> = {
  depthFraction: 'depth',
  chargeIt: 'charge rate',
  dischargeIt: 'discharge rate',
  temperatureC: 'temperature',
  clamping: 'clamping',
};

const it = (value: number) => formatQuantity(value, 'It', { significant: 2 });

/** The conditions that a sheet states; what it does not state is told apart. */
export function statedWords(claim: CatalogueClaim): string {
  const { depthFraction, chargeIt, dischargeIt, temperatureC, clamping, clampForceN } = claim;
  const force = clampForceN === null ? '' : ` with ${formatQuantity(clampForceN, 'N', { decimals: 0 })}`;
  const stated = [
    depthFraction !== null && `depth ${formatPercent(depthFraction)}`,
    chargeIt !== null && `charged at ${it(chargeIt)}`,
    dischargeIt !== null && `discharged at ${it(dischargeIt)}`,
    temperatureC !== null && formatQuantity(temperatureC, '°C', { decimals: 0 }),
    clamping === 'clamped' && `clamped${force}`,
    clamping === 'none' && 'not clamped',
  ].filter((part) => part !== false);
  return stated.length > 0 ? stated.join(', ') : 'none';
}

export const claimTitle = ({ cycles, endOfLifeFraction }: CatalogueClaim) =>
  `${formatNumber(cycles, { decimals: 0 })} cycles to ${formatPercent(endOfLifeFraction)}`;

type TrailLine = CataloguePage['trail'][number];

const actionWords: Record<string, string> = {
  proposed: 'proposed it',
  listed: 'listed it',
  declined: 'declined it',
  edited: 'changed it',
  merged: 'merged it into another',
  tookIn: 'merged another into it',
  claimAdded: 'added a claim',
  claimEdited: 'put a claim right',
  claimRemoved: 'took a claim out',
};
const byWords: Record<TrailLine['by'], string> = {
  owner: 'An owner',
  moderator: 'A moderator',
  system: 'Ebbline',
};

export const trailTitle = ({ by, action }: TrailLine) => `${byWords[by]} ${actionWords[action] ?? action}`;

const fieldWords: Record<string, string> = {
  maker: 'maker',
  name: 'name',
  format: 'format',
  ratedAh: 'rated capacity, Ah',
  nominalV: 'nominal voltage, V',
  faceAreaMm2: 'face area, mm²',
  massKg: 'mass, kg',
  cycles: 'cycles',
  endOfLifeFraction: 'end of life',
  depthFraction: 'depth',
  chargeIt: 'charge rate, It',
  dischargeIt: 'discharge rate, It',
  temperatureC: 'temperature, °C',
  clamping: 'clamping',
  clampForceN: 'clamp force, N',
  whereItStands: 'where it stands',
};

/** "rated capacity, Ah: 280, was 275" */
export function changeWords({ field, before, after }: TrailLine['changes'][number]): string {
  const name = fieldWords[field] ?? field;
  if (before === '') return `${name}: ${after}`;
  return `${name}: ${after || 'nothing'}, was ${before}`;
}
