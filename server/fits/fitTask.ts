import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { FitKind } from '../db/models';
import type { FitOutput } from './fitOutput';
import { fitPublic } from './fitPublic';
import { fitWorking } from './fitWorking';

export interface FitTask {
  kind: FitKind;
  rows: PoolCheck[];
  /** The public fit in force; the working fit does not look at it. */
  previous: FitOutput | null;
}

export type FitOutcome = { ok: true; output: FitOutput } | { ok: false; reason: string };

/** Runs one fit. Rows the fit can't take are an outcome, not a crash: the fit is stored as failed with its reason. */
export function runFitTask({ kind, rows, previous }: FitTask): FitOutcome {
  try {
    return { ok: true, output: kind === 'working' ? fitWorking(rows) : fitPublic(rows, previous) };
  } catch (error) {
    if (error instanceof RangeError) return { ok: false, reason: error.message };
    throw error;
  }
}
