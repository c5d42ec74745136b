import { resolve } from 'node:path';

import type { Transaction } from 'sequelize';

import { CurrentFit, Fit, type FitKind } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { createWorkerPool } from '../jobs/workerPool';
import { rescreenAfterRefit } from '../moderation/rescreenAfterRefit';
import { approvedMembers } from '../pool/approvedRows';
import type { PoolMember } from '../pool/poolRow';
import { publishedMembers } from '../pool/publicMembers';
import { publicStep } from '../pool/publicStep';
import { findAtOnceOwners } from './findAtOnceOwners';
import { codeVersion } from './codeVersion';
import { findCurrentFit } from './currentFit';
import { dataHashOf, evidenceOf } from './describeRows';
import type { FitOutcome, FitTask } from './fitTask';
import { findBankPrices } from './queries';
import { bankNumber, diagnosticsOf, parametersOf } from './storedFit';

/** A fit of a hundred times today's pool ends long before. */
const timeoutMs = 300_000;

/** The public fit is one of rows as they are published, in the order of a release. */
const readMembers: Record<FitKind, (transaction: Transaction) => Promise<PoolMember[]>> = {
  working: (transaction) => approvedMembers(transaction),
  public: publishedMembers,
};

type RunFit = (task: FitTask) => Promise<FitOutcome>;

/**
 * Job: fits the working pool, moves the public pool if enough waits, fits it. Each of the three is one transaction and
 * does nothing when it has been done already, so a kill in between costs a second run and leaves no half state.
 */
export function createRefit(deps: Deps): { handler: JobHandler; close: () => Promise<void> } {
  const pool = createWorkerPool(resolve(__dirname, 'fitWorker.ts'), deps.logger);
  const runFit: RunFit = async (task) =>
    (await pool.run(task, { signal: AbortSignal.timeout(timeoutMs) })) as FitOutcome;
  return {
    async handler() {
      await refitKind(deps, 'working', runFit);
      await rescreenAfterRefit(deps);
      await deps.db.transaction((transaction) => publicStep(deps, transaction));
      await refitKind(deps, 'public', runFit);
    },
    close: () => pool.close(),
  };
}

async function refitKind(deps: Deps, kind: FitKind, runFit: RunFit): Promise<void> {
  const members = await deps.db.transaction((transaction) => readMembers[kind](transaction));
  const { rows, bankOf } = inOrder(members);
  const dataHash = dataHashOf(rows);
  const last = await Fit.findOne({
    where: { kind },
    attributes: ['dataHash', 'codeVersion'],
    order: [['createdAt', 'DESC']],
  });
  const isDone = last ? last.dataHash === dataHash && last.codeVersion === codeVersion : rows.length === 0;
  if (isDone) return;
  const inForce = await findCurrentFit(deps, kind);
  const previous = inForce?.output ?? null;
  const atOnce = kind === 'public' && inForce ? await findAtOnceOwners(inForce.id) : [];
  const startedAt = performance.now();
  const outcome = await runFit({
    ...{ kind, rows, dataHash, previous, atOnce },
    prices: kind === 'public' ? await findBankPrices(members.map(({ row }) => row)) : [],
  });
  const durationMs = performance.now() - startedAt;
  if (!outcome.ok) deps.logger.warn({ kind, reason: outcome.reason }, 'a fit failed');
  await deps.db.transaction(async (transaction) => {
    const about = { kind, dataHash, durationMs, codeVersion, trigger: 'refit', createdAt: deps.clock() };
    const fit = await Fit.create(
      { ...about, ...evidenceOf(rows), ...described(members, bankOf, outcome) },
      { transaction },
    );
    if (fit.isGood) await CurrentFit.upsert({ kind, fitId: fit.id }, { transaction });
  });
}

/**
 * Rows with their banks numbered in the order of the members: the fit goes by the names of banks, and sums in another
 * order differ in their last digit.
 */
function inOrder(members: readonly PoolMember[]) {
  const numberOf = new Map<string, string>();
  for (const { row } of members)
    if (!numberOf.has(row.bank)) numberOf.set(row.bank, bankNumber(numberOf.size));
  const bankOf = new Map([...numberOf].map(([bank, number]) => [number, bank]));
  return { rows: members.map(({ row }) => ({ ...row, bank: numberOf.get(row.bank)! })), bankOf };
}

function described(members: readonly PoolMember[], bankOf: ReadonlyMap<string, string>, outcome: FitOutcome) {
  if (!outcome.ok) {
    const { kind, reason } = outcome;
    return {
      ...{ isGood: false, reason, diagnostics: { kind } },
      ...{ parameters: null, covariance: null, curves: null },
    };
  }
  const { output, pooled } = outcome;
  return {
    ...{ isGood: true, reason: null, curves: output, covariance: pooled.covariance },
    parameters: parametersOf(pooled, output),
    diagnostics: diagnosticsOf(pooled, members, output, bankOf),
  };
}
