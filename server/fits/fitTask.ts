import { fitPool, type PooledFit } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { FitKind } from '../db/models';
import type { FitOutput } from './fitOutput';
import type { BankPrice } from './pricesOf';
import { publicOutput } from './publicOutput';
import { workingOutput } from './workingOutput';

export interface FitTask {
  kind: FitKind;
  rows: PoolCheck[];
  dataHash: string;
  /** The fit of this kind in force: where to start from, and what has been published. */
  previous: FitOutput | null;
  /** Of banks of the public pool, for its fit. */
  prices?: BankPrice[];
  /** Keys of owners of whom a check was recalled at once: what holds back the changes of few does not hold back theirs. */
  atOnce?: string[];
}

export type FitOutcome =
  { ok: true; output: FitOutput; pooled: PooledFit } | { ok: false; reason: string; kind: string };

/**
 * Runs one fit. Rows the fit can't take and a fit that does not converge are outcomes, not crashes: they are stored
 * with their reason.
 */
export function runFitTask({
  kind,
  rows,
  dataHash,
  previous,
  prices = [],
  atOnce = [],
}: FitTask): FitOutcome {
  // The public fit starts from nothing, as anyone who repeats it from a release's file does.
  const warmStart = kind === 'working' ? previous?.model : undefined;
  const fit = fitPool(rows, { sha256: dataHash, warmStart });
  if (!fit.ok) return { ok: false, kind: fit.kind, reason: fit.reason };
  try {
    const output =
      kind === 'working'
        ? workingOutput(rows, fit)
        : publicOutput(rows, fit, { previous, prices, atOnce: new Set(atOnce) });
    return { ok: true, output, pooled: fit };
  } catch (error) {
    if (error instanceof RangeError) return { ok: false, kind: 'input', reason: error.message };
    throw error;
  }
}
