import type { CheckFields } from '@/lib/contract/checks';
import { type ConditionPeriod, conditionsToDate } from '@/lib/fit/pooled/conditions';
import type { PoolCheck, ValueSource } from '@/lib/fit/poolCheck';
import { yearsBetween } from '@/lib/units';

/** What the rows of a bank are made from. */
export interface PooledBank {
  id: string;
  ownerId: string;
  cellTypeId: string;
  /** Rated capacity of the whole bank, Ah. */
  ratedAh: number;
  firstUseMonth: string;
  isClampedNow: boolean;
  /** Days on which the clamping was changed, in order. */
  clampingChangedOn: string[];
}

/** An approved check of that bank. */
export interface PooledCheck {
  id: string;
  testedOn: string;
  ageYears: number;
  efc: number;
  capacityRefAh: number;
  relSdNew: number;
  conditions: CheckFields['conditions'];
  sources: CheckFields['sources'];
}

export interface PoolMember {
  checkId: string;
  row: PoolCheck;
}

/** The model has ln(years): a check in the month of first use counts as a day old. */
const shortestYears = 1 / 365.2425;
const sourceOrder: readonly ValueSource[] = ['metered', 'readOff', 'estimated'];

/**
 * The pool's rows of one bank: conditions to date from the periods between its checks. A period in which the clamping
 * was changed is two, its full cycles shared by time; an event is read as a change between clamped and not.
 * @param checks in order of their day
 */
export function poolRows(bank: PooledBank, checks: readonly PooledCheck[]): PoolMember[] {
  const periods: ConditionPeriod[] = [];
  const lastPeriod: number[] = [];
  let before = { testedOn: bank.firstUseMonth, efc: 0 };
  let sources: Sources = { temperature: 'metered', soc: 'metered' };
  const sourcesAt: Sources[] = [];
  for (const check of checks) {
    periods.push(...periodsOf(bank, before, check));
    lastPeriod.push(periods.length - 1);
    sources = worstOf(sources, sourcesOf(check));
    sourcesAt.push(sources);
    before = check;
  }
  const toDate = conditionsToDate(periods);
  return checks.map((check, i) => {
    const lived = toDate[lastPeriod[i]!]!;
    return {
      checkId: check.id,
      row: {
        ...lived,
        bank: bank.id,
        owner: bank.ownerId,
        cellType: bank.cellTypeId,
        ageYears: Math.max(check.ageYears, shortestYears),
        efc: check.efc,
        ratedAh: bank.ratedAh,
        capacityAh: check.capacityRefAh,
        relSd: check.relSdNew,
        temperatureSource: sourcesAt[i]!.temperature,
        socSource: sourcesAt[i]!.soc,
      },
    };
  });
}

function periodsOf(
  bank: PooledBank,
  before: { testedOn: string; efc: number },
  { testedOn, efc, conditions }: PooledCheck,
): ConditionPeriod[] {
  const changes = bank.clampingChangedOn.filter((day) => day > before.testedOn && day < testedOn);
  const edges = [before.testedOn, ...changes, testedOn];
  const spans = edges.slice(1).map((end, i) => Math.max(yearsBetween(edges[i]!, end), shortestYears));
  const total = spans.reduce((sum, years) => sum + years, 0);
  const gained = Math.max(efc - before.efc, 0);
  return spans.map((years, i) => ({
    years,
    efc: (gained * years) / total,
    temperatureC: conditions.temperatureMeanC,
    socMeanFraction: socMeanOf(conditions),
    depthFraction: conditions.depthFraction,
    dischargeIt: conditions.dischargeIt,
    isClamped: isClampedUntil(bank, edges[i + 1]!),
  }));
}

/** The state before a day: today's, turned over once for each change on that day or later. */
function isClampedUntil({ isClampedNow, clampingChangedOn }: PooledBank, day: string): boolean {
  const laterChanges = clampingChangedOn.filter((changedOn) => changedOn >= day).length;
  return laterChanges % 2 === 0 ? isClampedNow : !isClampedNow;
}

/** The mean as given, or the middle of the daily window; the contract asks for one of them. */
function socMeanOf({ socMeanFraction, socLowFraction, socHighFraction }: CheckFields['conditions']): number {
  return socMeanFraction ?? ((socLowFraction ?? 0) + (socHighFraction ?? 1)) / 2;
}

interface Sources {
  temperature: ValueSource;
  soc: ValueSource;
}

/** The air's temperature is at best a guess of the cells'; what has no source said is one too. */
function sourcesOf({ conditions, sources }: PooledCheck): Sources {
  return {
    temperature: conditions.temperatureOf === 'air' ? 'estimated' : (sources.temperatureMeanC ?? 'estimated'),
    soc: sources.socMeanFraction ?? sources.socLowFraction ?? 'estimated',
  };
}

function worstOf(one: Sources, other: Sources): Sources {
  const worse = (a: ValueSource, b: ValueSource) => (sourceOrder.indexOf(a) > sourceOrder.indexOf(b) ? a : b);
  return { temperature: worse(one.temperature, other.temperature), soc: worse(one.soc, other.soc) };
}
