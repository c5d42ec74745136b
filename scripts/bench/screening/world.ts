import { cellTypeOf } from '../../../data/demo/cellTypes';
import { generateDemo } from '../../../data/demo/generateDemo';
import { createDraws } from '../../../data/demo/random';
import type { DemoBank, DemoCheck } from '../../../data/demo/types';
import { fitPool, type PublishedFit } from '../../../lib/fit';
import { computeCheck } from '../../../lib/measure';
import { expectFromPool } from '../../../server/moderation/expectFromPool';
import { poolResidual } from '../../../server/moderation/rules/poolResidual';
import { screen } from '../../../server/moderation/screen';
import type { ScreenContext, ScreenFinding, ScreenPrevious } from '../../../server/moderation/screenTypes';
import { type PooledBank, type PooledCheck, poolRows } from '../../../server/pool/poolRow';
import { mistakes, type Sent } from './mistakes';

const mistakeShare = 0.02;
const gross = new Set(['doubtful', 'repairable']);

/** One screened submission of a simulated world. */
export interface Screened {
  kind: string | null;
  findings: ScreenFinding[];
  isFlagged: boolean;
}

interface Tested {
  context: ScreenContext;
  kind: string | null;
  pooled: PooledCheck;
  bank: PooledBank;
  isNew: boolean;
  findings: ScreenFinding[];
}

/**
 * Simulates a world of about 1,200 banks (the demo's generator, its queue left out), makes mistakes in 2 % of the checks
 * and screens all: in their order without the pool, then against a fit of what passed, each from its bank's earlier
 * checks that passed. What is flagged joins no history.
 */
export function screenWorld(seed: number): Screened[] {
  const draws = createDraws(seed, 90);
  const planted = new Map(Object.keys(mistakes).map((kind) => [kind, 0]));
  // The kinds made least so far are tried first, as some fit few checks.
  const drawKinds = () =>
    draws.chance(mistakeShare)
      ? draws.shuffled([...planted.keys()]).sort((a, b) => planted.get(a)! - planted.get(b)!)
      : [];
  const banks = generateDemo(seed).banks.filter(({ checks }) =>
    checks.every(({ pending }) => pending === null),
  );
  const tested = banks.map((bank) => screenBank(bank, { seed, planted, drawKinds }));
  const passed = tested.map((ofBank) => ofBank.filter(({ findings, isNew }) => isNew && !isGross(findings)));
  const rows = passed.flatMap((ofBank) =>
    ofBank[0]
      ? poolRows(
          ofBank[0].bank,
          ofBank.map(({ pooled }) => pooled),
        )
      : [],
  );
  const fit = fitPool(
    rows.map(({ row }) => row),
    { isWithoutInteractions: true },
  );
  if (!fit.ok) throw new Error(`the pool of world ${seed} could not be fitted: ${fit.reason}`);
  return tested.flatMap((ofBank, place) =>
    ofBank.map((one) => {
      const findings = [...one.findings, ...poolFinding(fit, one, passed[place]!)];
      return { kind: one.kind, findings, isFlagged: isGross(findings) };
    }),
  );
}

const isGross = (findings: readonly ScreenFinding[]) => findings.some(({ severity }) => gross.has(severity));

function poolFinding(fit: PublishedFit, one: Tested, passed: readonly Tested[]): ScreenFinding[] {
  if (!one.isNew) return [];
  const others = passed.map(({ pooled }) => pooled).filter(({ testedOn }) => testedOn < one.pooled.testedOn);
  const pool = expectFromPool(fit, one.bank, { check: one.pooled, others });
  const finding = poolResidual({ ...one.context, pool });
  return finding ? [finding] : [];
}

interface Planting {
  seed: number;
  planted: Map<string, number>;
  drawKinds: () => string[];
}

function screenBank(bank: DemoBank, { seed, planted, drawKinds }: Planting): Tested[] {
  const { parallel, series, firstUseMonth, cellTypeId } = bank.fields;
  const { ratedAh: ratedAhCell, nominalV } = cellTypeOf(cellTypeId);
  const draws = createDraws(seed, 91, bank.checks.length);
  const described = { parallel, series, ratedAhCell, nominalV, firstUseMonth, events: bank.events };
  const before: ScreenPrevious[] = [];
  return bank.checks.flatMap((check: DemoCheck) => {
    if (check.state === 'turnedAway') return [];
    const honest: Sent = { fields: check.fields, bank: described };
    const previous = before.findLast(({ state }) => state === 'approved');
    let sent = honest;
    let kind: string | null = null;
    for (const name of drawKinds()) {
      const made = mistakes[name]!(honest, { draws, previous: previous?.fields ?? null });
      if (!made) continue;
      [sent, kind] = [made, name];
      planted.set(name, planted.get(name)! + 1);
      break;
    }
    const { testedOn } = sent.fields.reading;
    const computed = computeCheck(
      sent.fields,
      sent.bank,
      null,
      previous ? { testedOn: previous.testedOn, efc: previous.computed.efc } : null,
    );
    const context: ScreenContext = {
      ...{ bank: sent.bank, fields: sent.fields, computed, log: null },
      ...{ previousChecks: [...before], sameLogCheckIds: [] },
    };
    const findings = screen(context);
    before.push({
      ...{ checkId: check.id, testedOn, fields: sent.fields, computed },
      state: isGross(findings) ? 'turnedAway' : 'approved',
    });
    const { capacityRefAh, relSdNew, ageYears, efc } = computed;
    return [
      {
        ...{ context, kind, findings, isNew: bank.fields.bought === 'new' },
        pooled: {
          ...{ id: check.id, testedOn, ageYears, efc, capacityRefAh, relSdNew, isRealFailure: false },
          ...{ conditions: sent.fields.conditions, sources: sent.fields.sources },
        },
        bank: {
          ...{ id: bank.id, ownerId: bank.ownerId, cellTypeId, firstUseMonth: sent.bank.firstUseMonth },
          ratedAh: sent.bank.ratedAhCell * sent.bank.parallel,
          isClampedNow: bank.fields.clamping !== 'none',
          failedOn: [],
          clampingChangedOn: bank.events
            .filter(({ kind: of }) => of === 'clampingChanged')
            .map((e) => e.happenedOn),
        },
      },
    ];
  });
}
