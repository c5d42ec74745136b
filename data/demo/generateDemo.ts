import type { CheckFields } from '@/lib/contract/checks';

import { drawBankFields } from './bankFacts';
import { drawUse } from './bankUse';
import { cellTypeOf } from './cellTypes';
import { submissionOf } from './checkStates';
import { liveThrough } from './history';
import { drawLifeCourse, later, type LifeCourse, yearsSinceEven } from './lifeCourse';
import { makeMistake } from './mistakes';
import { dealBanks, type PlannedBank } from './people';
import { createDraws, type Draws } from './random';
import { drawMeter, drawReading } from './reading';
import { drawReporter, reportConditions } from './report';
import { truth as world } from './truth';
import type { BankTruth, DemoBank, DemoCheck, DemoData, Meter, Reporter, TrueState } from './types';

/** The seed of the scenario that is shipped. */
export const demoSeed = 20_261_130;

/** No vowels and no look-alikes, as the product draws them. */
const pseudonymAlphabet = 'CDFGHJKMNPQRTVWXY34679';

/** The whole scenario: owners, banks, events and checks. The same seed gives the same data. */
export function generateDemo(seed: number = demoSeed): DemoData {
  const { owners, dealt } = dealBanks(seed);
  const taken = new Set<string>();
  const banks = dealt.map(({ owner, cellTypeId, plan }, index) => {
    const draws = createDraws(seed, 2, index);
    const ownerId = owners[owner]!.id;
    return generateBank(draws, {
      seed,
      index,
      ownerId,
      cellTypeId,
      plan,
      pseudonym: drawPseudonym(draws, taken),
    });
  });
  return { owners, banks };
}

function drawPseudonym(draws: Draws, taken: Set<string>): string {
  for (;;) {
    const pseudonym = Array.from({ length: 5 }, () => draws.pick([...pseudonymAlphabet])).join('');
    if (taken.has(pseudonym)) continue;
    taken.add(pseudonym);
    return pseudonym;
  }
}

interface BankPlace {
  seed: number;
  index: number;
  ownerId: string;
  cellTypeId: string;
  plan: PlannedBank | null;
  pseudonym: string;
}

function generateBank(
  draws: Draws,
  { seed, index, ownerId, cellTypeId, plan, pseudonym }: BankPlace,
): DemoBank {
  const fields = drawBankFields(draws, cellTypeId, plan);
  const truth = drawTruth(draws, fields, plan !== null);
  const course = drawLifeCourse(draws, fields.firstUseMonth, plan);
  const [meter, reporter] = [drawMeter(draws), drawReporter(draws)];
  const { firstUseMonth } = fields;
  const isClamped = fields.clamping !== 'none';
  const states = liveThrough({ seed, bank: index, firstUseMonth, isClamped }, truth, course);
  const bank: DemoBank = {
    ...{ id: draws.uuid(), ownerId, pseudonym, fields, truth, events: course.events, checks: [] },
    createdAt: `${later(course.testedOn[0] ?? `${firstUseMonth}-15`, 0)}T06:30:00.000Z`,
  };
  const instruments = plan ? steady(meter, reporter, plan) : { meter, reporter };
  const tester: Tester = { seed, index, plan, course, bank, ...instruments };
  for (const [place, state] of states.entries()) addCheck(tester, place, state);
  const first = bank.checks[0];
  if (first && first.truth.ageYears < 0.4 && fields.bought === 'new')
    bank.fields = { ...fields, startCapacityAh: first.fields.reading.capacityAh };
  return bank;
}

function drawTruth(draws: Draws, fields: DemoBank['fields'], isPlanned: boolean): BankTruth {
  const use = drawUse(draws, fields, isPlanned ? 'home' : undefined);
  return {
    use,
    start: draws.normal(0, world.startSd * (isPlanned ? 0.5 : 1)),
    shift: cellTypeOf(fields.cellTypeId).effect + draws.normal(0, world.fadeSd * (isPlanned ? 0.5 : 1)),
    priorYears: fields.bought === 'new' ? 0 : draws.uniform(1, 4),
    testIt: Number(draws.weighted({ '0.1': 0.2, '0.15': 0.25, '0.2': 0.3, '0.25': 0.15, '0.3': 0.1 })),
    imbalanceMvPerYear: Math.exp(draws.normal(Math.log(3), 0.4)),
  };
}

/** The banks people meet first in the demo are well measured: what is odd about them is what the queue is to show. */
function steady(meter: Meter, reporter: Reporter, plan: PlannedBank): { meter: Meter; reporter: Reporter } {
  const counterKind = plan.pending === 'counterBackwards' ? 'efc' : (reporter.counterKind ?? 'ah');
  return {
    meter: {
      instrument: 'Shunt and counter, class 0.5',
      ...{ gainErrorFraction: 0.005, readingNoiseFraction: 0.002, gain: 1 + (meter.gain - 1) / 4 },
    },
    reporter: {
      ...reporter,
      ...{ counterKind, isAir: false, depthFactor: 1, rateFactor: 1, counterFactor: 1 },
      sources: { ...reporter.sources, depth: 'readOff', rate: 'readOff' },
    },
  };
}

interface Tester {
  seed: number;
  index: number;
  plan: PlannedBank | null;
  course: LifeCourse;
  bank: DemoBank;
  meter: Meter;
  reporter: Reporter;
}

/** What cells out of balance cost at most. */
const largestDrift = 0.05;

function addCheck(
  { seed, index, plan, course, bank, meter, reporter }: Tester,
  place: number,
  state: TrueState,
): void {
  const draws = createDraws(seed, 4, index, place);
  const testedOn = course.testedOn[place]!;
  const isLast = place === course.testedOn.length - 1;
  const pending = isLast ? (plan?.pending ?? null) : null;
  const { parallel, series, firstUseMonth } = bank.fields;
  const cellType = cellTypeOf(bank.fields.cellTypeId);
  const sinceEven = yearsSinceEven(course, firstUseMonth, testedOn);
  const reading = drawReading(draws, bank, meter, {
    ...{ testedOn, ageYears: state.ageYears, isCold: pending === 'coldAndCutShort' },
    sohFraction: state.sohFraction * (1 - Math.min(largestDrift, course.driftPerYear * sinceEven)),
    imbalanceMv: 8 + bank.truth.imbalanceMvPerYear * sinceEven,
    isBySteadyHand: plan !== null,
  });
  const ratings = { ratedAh: cellType.ratedAh * parallel, nominalV: cellType.nominalV * series };
  const reported = reportConditions(draws, reporter, state, ratings);
  const sound: CheckFields = { reading, ...reported, uploadId: null, photoId: null, note: '' };
  const previous = bank.checks.filter((check) => check.state === 'approved').at(-1)?.fields ?? null;
  const fields = pending ? makeMistake(pending, sound, { parallel, series, previous }) : sound;
  const identity = () => ({ id: draws.uuid(), idempotencyKey: draws.uuid(), truth: state });
  bank.checks.push(
    ...submissionOf(draws, { fields, pending, plan, isLast }).map((submission): DemoCheck => ({
      ...identity(),
      ...submission,
    })),
  );
}
