import { resolve } from 'node:path';

import type { Transaction } from 'sequelize';

import type { PoolCheck } from '@/lib/fit/poolCheck';

import { CurrentFit, Fit, type FitKind } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { createWorkerPool } from '../jobs/workerPool';
import { approvedRows } from '../pool/approvedRows';
import { publicMembers } from '../pool/publicMembers';
import { publicStep } from '../pool/publicStep';
import { codeVersion } from './codeVersion';
import { findCurrentFit } from './currentFit';
import { dataHashOf, evidenceOf, fitSeed } from './describeRows';
import type { FitOutput } from './fitOutput';
import type { FitOutcome, FitTask } from './fitTask';

/** A fit of a hundred times today's pool ends long before. */
const timeoutMs = 300_000;

const readRows: Record<FitKind, (transaction: Transaction) => Promise<PoolCheck[]>> = {
  working: approvedRows,
  public: async (transaction) => (await publicMembers(transaction)).map(({ row }) => row),
};

/**
 * Job: fits the working pool, moves the public pool if enough waits, fits it. Each of the three is one transaction and
 * does nothing when it has been done already, so a kill in between costs a second run and leaves no half state.
 */
export function createRefit(deps: Deps): { handler: JobHandler; close: () => Promise<void> } {
  const pool = createWorkerPool(resolve(__dirname, 'fitWorker.ts'), deps.logger);
  const runFit = async (task: FitTask) =>
    (await pool.run(task, { signal: AbortSignal.timeout(timeoutMs) })) as FitOutcome;
  return {
    async handler() {
      await refitKind(deps, 'working', runFit);
      await deps.db.transaction((transaction) => publicStep(deps, transaction));
      await refitKind(deps, 'public', runFit);
    },
    close: () => pool.close(),
  };
}

async function refitKind(
  deps: Deps,
  kind: FitKind,
  runFit: (task: FitTask) => Promise<FitOutcome>,
): Promise<void> {
  const rows = await deps.db.transaction((transaction) => readRows[kind](transaction));
  const dataHash = dataHashOf(rows);
  const last = await Fit.findOne({
    where: { kind },
    attributes: ['dataHash', 'codeVersion'],
    order: [['createdAt', 'DESC']],
  });
  const isDone = last ? last.dataHash === dataHash && last.codeVersion === codeVersion : rows.length === 0;
  if (isDone) return;
  const previous = kind === 'public' ? ((await findCurrentFit(deps, kind))?.output ?? null) : null;
  const startedAt = performance.now();
  const outcome = await runFit({ kind, rows, previous });
  const durationMs = performance.now() - startedAt;
  if (!outcome.ok) deps.logger.warn({ kind, reason: outcome.reason }, 'a fit failed');
  await deps.db.transaction(async (transaction) => {
    const fit = await Fit.create(
      { ...describe(rows, outcome), kind, dataHash, durationMs, createdAt: deps.clock() },
      { transaction },
    );
    if (fit.isGood) await CurrentFit.upsert({ kind, fitId: fit.id }, { transaction });
  });
}

function describe(rows: readonly PoolCheck[], outcome: FitOutcome) {
  const common = { trigger: 'refit', codeVersion, ...evidenceOf(rows) };
  if (!outcome.ok) {
    const nothing = { parameters: null, covariance: null, diagnostics: null, curves: null };
    return { ...common, ...nothing, isGood: false, reason: outcome.reason };
  }
  const { output } = outcome;
  return {
    ...common,
    isGood: true,
    reason: null,
    parameters: parametersOf(output),
    // The curves' ranges come from resampling banks, which gives no covariance of its own.
    covariance: null,
    diagnostics: { seed: fitSeed, refusals: countRefusals(output) },
    curves: output,
  };
}

function parametersOf({ views }: FitOutput) {
  return views.flatMap(({ cellType, bandKey, result }) =>
    result.ok ? [{ cellType, bandKey, k: result.k, z: result.z }] : [],
  );
}

function countRefusals({ views }: FitOutput): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const { result } of views) if (!result.ok) counts[result.reason] = (counts[result.reason] ?? 0) + 1;
  return counts;
}
