import type { Href } from 'expo-router';

import { Figure, type GaugeScale, Link, Quiet, RangeBar, Stack, Text } from '@/components/ui';
import type { CellEntry, Use } from '@/lib/contract/cells';
import { chosenUseQuery } from '@/lib/contract/chosenUse';
import {
  formatCount,
  formatNumber,
  formatPercent,
  formatQuantity,
  formatRange,
  formatSmallMoney,
} from '@/lib/units';

import { carriedClaims } from './cellWords';
import { deliveredPrice } from './deliveredPrice';
import { lifeFigure, lifeSummary, standingWords, toldOf } from './lifeWords';
import { absenceWords } from './poolWords';

/** What stands in the list of one cell type, in rows and in columns alike. */
interface PartProps {
  entry: CellEntry;
}

/** The name leads to the cell type's page at the same use. */
export function EntryName({ entry: { cellType }, use }: PartProps & { use: Use }) {
  const href: Href = {
    pathname: '/cells/[cellId]',
    params: { cellId: cellType.id, ...definedOf(chosenUseQuery(use)) },
  };
  return (
    <Text style={{ flexShrink: 1, minWidth: 0 }}>
      <Link href={href} size="lead" tone="ink" strong bare>
        {cellType.name}
      </Link>
      <Quiet>{`  ${formatQuantity(cellType.ratedAh, 'Ah', { decimals: 0 })}`}</Quiet>
    </Text>
  );
}

const definedOf = (query: Record<string, string | undefined>) =>
  Object.fromEntries(Object.entries(query).filter(([, value]) => value !== undefined));

export function EntryGauge({ entry: { cellType, life, claims }, scale }: PartProps & { scale: GaugeScale }) {
  if (!life) return null;
  const quoted = carriedClaims(claims)[0]?.label.impliedYears.estimate;
  const told = toldOf(life);
  const hasFigure = told === 'figure' || told === 'range';
  return (
    <RangeBar
      scale={scale}
      summary={`${cellType.name}: ${lifeSummary(life, quoted)}`}
      banks={hasFigure && life.rangeOfBanks ? [life.rangeOfBanks.lower, life.rangeOfBanks.upper] : undefined}
      interval={hasFigure ? [life.years.lower, life.years.upper] : undefined}
      estimate={hasFigure ? life.years.estimate : undefined}
      quoted={quoted}
      status={told === 'figure' ? 'projected' : 'extrapolated'}
      isOfAll={life.basis === 'pool'}
    />
  );
}

/** "13 (11–15) y", or why there is none. */
export function EntryYears({ entry: { life, absence } }: PartProps) {
  if (!life) return <Quiet>{absenceWords[absence ?? 'noFit'].short}</Quiet>;
  const { value, range } = lifeFigure(life);
  if (value === '–') return <Quiet>no figure</Quiet>;
  const isOwn = life.basis !== 'pool';
  return (
    <Text>
      <Figure size="lead" strong={isOwn} tone={isOwn ? 'ink' : 'quiet'}>
        {value}
      </Figure>
      {range !== '' && <Figure tone="quiet">{` (${range})`}</Figure>}
      <Text weight={isOwn ? 'strong' : 'regular'} tone={isOwn ? 'ink' : 'quiet'}>
        {' y'}
      </Text>
    </Text>
  );
}

/** "2,850 EFC, projected" */
export function cyclesWords({ life }: CellEntry): string {
  if (!life) return '';
  const { estimate, lower, upper } = life.efc;
  const told = toldOf(life);
  if (told === 'figure') return `${formatCount(roundEfc(estimate))} EFC, ${life.status}`;
  if (told === 'range')
    return `${formatRange(roundEfc(lower), roundEfc(upper), { decimals: 0 })} EFC, extrapolated`;
  return standingWords(life);
}

const roundEfc = (efc: number) => Math.round(efc / 10) * 10;

/** "87 %"; nothing for a cell type that the pool's figure stands in for. */
export const leftWords = ({ life }: CellEntry): string | null =>
  life?.basis === 'cellType' ? formatPercent(life.leftAtReachFraction.estimate) : null;

export const readToWords = ({ life, evidence }: CellEntry): string | null =>
  life && evidence && life.basis === 'cellType'
    ? formatQuantity(life.reachYears, 'y', { decimals: 1 })
    : null;

/** "€0.021"; the range alone of an extrapolated life; why there is none. */
export function priceWords(entry: CellEntry): string {
  const told = deliveredPrice(entry);
  if (told.ok) {
    const { estimate, lower, upper } = told.perKwh;
    const ends = `${formatSmallMoney(lower, told.currency)}–${formatSmallMoney(upper, told.currency)}`;
    return entry.life && toldOf(entry.life) === 'range' ? ends : formatSmallMoney(estimate, told.currency);
  }
  return told.reason === 'notEnoughPrices' ? 'not enough prices' : '–';
}

/** What the label implies at this use, with measured over implied where it can be told. */
export function EntryLabel({ entry: { claims, life } }: PartProps) {
  const carried = carriedClaims(claims)[0];
  if (!carried) return <Quiet>{claims.length === 0 ? 'none on record' : 'conditions not stated'}</Quiet>;
  const { impliedYears, ratio } = carried.label;
  const isRatioTold = ratio && life && toldOf(life) === 'figure';
  return (
    <Stack gap="hair" style={{ alignItems: 'flex-end' }}>
      <Figure tone="brass">{formatQuantity(impliedYears.estimate, 'y', { decimals: 0 })}</Figure>
      {isRatioTold && <Quiet>{`×${formatNumber(ratio.estimate, { decimals: 2 })} measured`}</Quiet>}
    </Stack>
  );
}
