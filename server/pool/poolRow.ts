import type { CheckFields } from '@/lib/contract/checks';
import type { PoolCheck, ValueSource } from '@/lib/fit/poolCheck';
import { conditionsToDate, type PeriodConditions, socMeanOf } from '@/lib/measure';
import { daysBetween } from '@/lib/units';

import type { BankIdentity } from '../publicView/identity';

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
  /** Days on which a cell failed or swelled, in order. */
  failedOn: string[];
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
  isRealFailure: boolean;
}

export interface PoolMember {
  checkId: string;
  row: PoolCheck;
}

/** An approved check with the fields by which its bank could be found. */
export interface ApprovedMember extends PoolMember {
  identity: BankIdentity;
}

/** A check of the public pool, and how far those fields are generalised in it. */
export interface PublicPoolMember extends ApprovedMember {
  level: number;
}

/** The model has ln(years): a check in the month of first use counts as a day old. */
const shortestDays = 1;
const daysPerYear = 365.2425;
const halfFull = 0.5;
const sourceOrder: readonly ValueSource[] = ['metered', 'readOff', 'estimated'];

/**
 * The pool's rows of one bank: conditions to date from the periods between its checks. A period in which the clamping
 * was changed is two, its full cycles shared by time; an event is read as a change between clamped and not.
 * @param checks in order of their day
 */
export function poolRows(bank: PooledBank, checks: readonly PooledCheck[]): PoolMember[] {
  const periods: PeriodConditions[] = [];
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
  return checks.map((check, i) => ({
    checkId: check.id,
    row: {
      ...conditionsToDate(periods.slice(0, lastPeriod[i]! + 1)),
      isClampingUnclear: clampingChangesBefore(bank, check.testedOn) > 1,
      bank: bank.id,
      owner: bank.ownerId,
      cellType: bank.cellTypeId,
      ageYears: Math.max(check.ageYears, shortestDays / daysPerYear),
      efc: check.efc,
      ratedAh: bank.ratedAh,
      capacityAh: check.capacityRefAh,
      relSd: check.relSdNew,
      temperatureSource: sourcesAt[i]!.temperature,
      socSource: sourcesAt[i]!.soc,
      ...(check.isRealFailure ? { isKept: true } : {}),
      ...(hasFailedBy(bank, checks, i) ? { hasFailed: true } : {}),
    },
  }));
}

function periodsOf(
  bank: PooledBank,
  before: { testedOn: string; efc: number },
  { testedOn, efc, conditions }: PooledCheck,
): PeriodConditions[] {
  const changes = bank.clampingChangedOn.filter((day) => day > before.testedOn && day < testedOn);
  const edges = [before.testedOn, ...changes, testedOn];
  const spans = edges.slice(1).map((end, i) => Math.max(daysBetween(edges[i]!, end), shortestDays));
  const total = spans.reduce((sum, days) => sum + days, 0);
  const gained = Math.max(efc - before.efc, 0);
  return spans.map((days, i) => ({
    days,
    efc: (gained * days) / total,
    temperatureC: conditions.temperatureMeanC,
    // The contract asks for the mean or the daily window.
    socMeanFraction: socMeanOf(conditions, days) ?? halfFull,
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

/** Known by the check of this place; what happened after the last one is told with it. */
function hasFailedBy({ failedOn }: PooledBank, checks: readonly PooledCheck[], place: number): boolean {
  const isLast = place === checks.length - 1;
  const seen = checks.slice(0, place + 1);
  return (
    seen.some(({ isRealFailure }) => isRealFailure) ||
    failedOn.some((day) => isLast || day <= checks[place]!.testedOn)
  );
}

function clampingChangesBefore({ clampingChangedOn }: PooledBank, day: string): number {
  return clampingChangedOn.filter((changedOn) => changedOn < day).length;
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
