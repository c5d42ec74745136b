import { resolve } from 'node:path';

import type { Piscina } from 'piscina';
import type { Sequelize } from 'sequelize';

import { standardUse } from '@/lib/contract/cells';
import type { SubmissionEffect } from '@/lib/contract/moderation';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { severityOrder } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { createWorkerPool } from '../jobs/workerPool';
import { approvedMembers, pooledBank, pooledCheck } from '../pool/approvedRows';
import { type PoolMember, poolRows } from '../pool/poolRow';
import type { EffectOutcome, EffectTask } from './effectTask';
import { findHistory, findSubmission, type LoadedSubmission } from './queries';

const daysPerYear = 365.2425;
const { cyclesPerDay, ...standard } = standardUse;
const use = { ...standard, efcPerYear: standard.depthFraction * cyclesPerDay * daysPerYear };
const timeoutMs = 60_000;
const neighbourCount = 8;
const mostKept = 50;

/** Answers are kept until the fit or the check changes. */
const kept = new WeakMap<Sequelize, Map<string, Promise<SubmissionEffect>>>();
const pools = new WeakMap<Sequelize, Piscina>();

/**
 * What the working life of the check's cell type is without the check and with it, by two fits in a worker thread, and
 * the approved checks nearest to it in age and use. Worked out on demand, once for each state of fit and check.
 * @throws AppError notFound
 */
export async function findEffect(deps: Deps, checkId: string): Promise<SubmissionEffect> {
  const check = await findSubmission(checkId);
  if (!check) throw new AppError('notFound');
  const working = await findCurrentFit(deps, 'working');
  const key = `${working?.id ?? 'none'} ${checkId} ${check.version}`;
  const answers = kept.get(deps.db) ?? new Map<string, Promise<SubmissionEffect>>();
  kept.set(deps.db, answers);
  const known = answers.get(key);
  if (known) return known;
  const found = workOut(deps, check, working?.output.model ?? null);
  answers.set(key, found);
  if (answers.size > mostKept) answers.delete(answers.keys().next().value!);
  // A failure is tried again at the next look.
  found.catch(() => answers.delete(key));
  return found;
}

async function workOut(
  deps: Deps,
  check: LoadedSubmission,
  warmStart: EffectTask['warmStart'],
): Promise<SubmissionEffect> {
  const nothing = { without: null, with: null, asAh: null, isSetAside: false, neighbours: [] };
  const { bank } = check;
  if (bank.bought !== 'new') return { ...nothing, absence: 'notOfThePool' };
  const members = await deps.db.transaction((transaction) => approvedMembers(transaction));
  const rowsOfBank = await bankRows(check);
  const given = rowsOfBank.find(({ checkId }) => checkId === check.id)!;
  const asAh = likelyAh(check);
  const repair = asAh === null ? 1 : asAh / check.reading.capacityAh;
  const own = { ...given, row: { ...given.row, capacityAh: given.row.capacityAh * repair } };
  const others = members.filter(({ row }) => row.bank !== bank.id).map(({ row }) => row);
  const neighbours = nearestTo(own.row, others);
  // The bank's other approved checks stand in both fits as they are made without this one.
  const without = [
    ...others,
    ...members
      .filter(({ row, checkId }) => row.bank === bank.id && checkId !== check.id)
      .map(({ row }) => row),
  ];
  const with_ = [
    ...others,
    ...rowsOfBank.filter(({ checkId }) => checkId !== check.id).map(({ row }) => row),
    own.row,
  ];
  if (without.length === 0) return { ...nothing, absence: 'tooFewChecks' };
  const task: EffectTask = { without, with: with_, cellType: bank.cellTypeId, use, warmStart };
  const outcome = (await workerOf(deps).run(task, {
    signal: AbortSignal.timeout(timeoutMs),
  })) as EffectOutcome;
  if (!outcome.ok) return { ...nothing, absence: outcome.absence, asAh, neighbours };
  return {
    absence: null,
    without: outcome.without,
    with: outcome.with,
    asAh,
    isSetAside: outcome.isSetAside,
    neighbours,
  };
}

/** The charge that the screening proposes, Ah, for a check with a slip of scale that is not decided yet. */
function likelyAh({ state, findings }: LoadedSubmission): number | null {
  if (state !== 'submitted' && state !== 'sentBack') return null;
  const repairable = severityOrder.indexOf('repairable');
  const proposal = findings.find(
    ({ severity, evidence }) => severity === repairable && typeof evidence.repairedAh === 'number',
  );
  return (proposal?.evidence.repairedAh as number | undefined) ?? null;
}

/** Rows of the bank's approved checks and this one. */
async function bankRows(check: LoadedSubmission): Promise<PoolMember[]> {
  const history = await findHistory(check.bankId);
  const checks = history.filter(({ id, state }) => id === check.id || state === 'approved');
  return poolRows(pooledBank(check.bank), checks.map(pooledCheck));
}

/** Ends the thread behind the looks. */
export async function closeEffects({ db }: Deps): Promise<void> {
  await pools.get(db)?.close();
  pools.delete(db);
}

/** One thread for all looks. */
function workerOf({ db, logger }: Deps): Piscina {
  const known = pools.get(db);
  if (known) return known;
  const pool = createWorkerPool(resolve(__dirname, 'effectWorker.ts'), logger);
  pools.set(db, pool);
  return pool;
}

/** Checks of other banks that are nearest in age and use, each part over the spread that home banks show in it. */
function nearestTo(row: PoolCheck, others: readonly PoolCheck[]): SubmissionEffect['neighbours'] {
  const perYear = ({ efc, ageYears }: PoolCheck) => efc / ageYears;
  const distance = (other: PoolCheck) =>
    Math.hypot(
      Math.log(other.ageYears / row.ageYears) / 0.3,
      (perYear(other) - perYear(row)) / 80,
      (other.temperatureC - row.temperatureC) / 4,
      (other.depthFraction - row.depthFraction) / 0.2,
      Math.log(other.dischargeIt / row.dischargeIt) / 0.5,
      other.isClamped === row.isClamped ? 0 : 1,
      other.cellType === row.cellType ? 0 : 2,
    );
  return others
    .map((other) => ({ other, away: distance(other) }))
    .sort((a, b) => a.away - b.away)
    .slice(0, neighbourCount)
    .map(({ other }) => ({
      ...{ ageYears: other.ageYears, efc: other.efc, depthFraction: other.depthFraction },
      ...{ temperatureC: other.temperatureC, isClamped: other.isClamped },
      sohFraction: other.capacityAh / other.ratedAh,
    }));
}
