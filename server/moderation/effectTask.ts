import type { LifeWith } from '@/lib/contract/moderation';
import { fitPool, lifeAt, type PublishedFit, type Use } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

export interface EffectTask {
  without: PoolCheck[];
  /** The same rows and the check's, which is the last. */
  with: PoolCheck[];
  cellType: string;
  use: Use;
  warmStart: PublishedFit | null;
}

export type EffectOutcome =
  | { ok: true; without: LifeWith; with: LifeWith; isSetAside: boolean }
  | { ok: false; absence: 'tooFewChecks' | 'notConverged' };

/** Fits the pool without a check and with it, both from where the working fit stands, and compares the lives. Pure. */
export function runEffectTask(task: EffectTask): EffectOutcome {
  const warmStart = task.warmStart ?? undefined;
  const without = lifeOf(task, task.without, warmStart);
  if (!without.ok) return without;
  const with_ = lifeOf(task, task.with, warmStart);
  if (!with_.ok) return with_;
  const last = task.with.length - 1;
  const isSetAside =
    with_.fit.screen.some(({ row, action }) => row === last && action === 'quarantine') ||
    with_.fit.excluded.some(({ row }) => row === last);
  return { ok: true, without: without.life, with: with_.life, isSetAside };
}

function lifeOf({ cellType, use }: EffectTask, rows: readonly PoolCheck[], warmStart?: PublishedFit) {
  const fit = fitPool(rows, { warmStart, isWithoutInteractions: true, scenarios: [] });
  if (!fit.ok) return { ok: false, absence: fit.kind === 'input' ? 'tooFewChecks' : 'notConverged' } as const;
  const row = fit.cellTypes.find((one) => one.cellType === cellType);
  const found = lifeAt(fit, use, row ? { cellType } : {});
  const isOwn = found.basis === 'cellType';
  const life: LifeWith = {
    years: found.years,
    leftAtReachFraction: found.capacityAtReach,
    status: found.status,
    basis: isOwn ? 'cellType' : 'pool',
    banks: isOwn ? row!.banks : fit.data.banks,
    checks: isOwn ? row!.checks : fit.data.used,
  };
  return { ok: true, fit, life } as const;
}
