import type { Sequelize } from 'sequelize';

import { CurrentFit, Fit, type FitKind } from '../db/models';
import type { Deps } from '../deps';
import { type FitOutput, fitOutputSchema } from './fitOutput';

export interface FitInForce {
  id: string;
  fittedAt: Date;
  output: FitOutput;
}

/** Read once per fit: outputs are large and never change. Null is one that this code can't read. */
const parsed = new WeakMap<Sequelize, Map<FitKind, { id: string; fit: FitInForce | null }>>();

/**
 * The good fit in force of a kind, or null before the first. One that older code stored in another form counts as
 * none; the next refit replaces it.
 */
export async function findCurrentFit({ db, logger }: Deps, kind: FitKind): Promise<FitInForce | null> {
  const current = await CurrentFit.findByPk(kind);
  if (!current) return null;
  const known = parsed.get(db)?.get(kind);
  if (known?.id === current.fitId) return known.fit;
  const { id, createdAt, curves } = await Fit.findByPk(current.fitId, { rejectOnEmpty: true });
  const read = fitOutputSchema.safeParse(curves);
  if (!read.success) logger.warn({ kind, id }, 'the fit in force is of older code and waits for a refit');
  const fit = read.success ? { id, fittedAt: createdAt, output: read.data } : null;
  parsed.set(db, new Map(parsed.get(db)).set(kind, { id, fit }));
  return fit;
}
