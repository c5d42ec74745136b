import type { Sequelize } from 'sequelize';

import { CurrentFit, Fit, type FitKind } from '../db/models';
import type { Deps } from '../deps';
import { type FitOutput, fitOutputSchema } from './fitOutput';

export interface FitInForce {
  id: string;
  fittedAt: Date;
  output: FitOutput;
}

/** Parsed once per fit: outputs are large and never change. */
const parsed = new WeakMap<Sequelize, Map<FitKind, FitInForce>>();

/** The good fit in force of a kind, or null before the first. */
export async function findCurrentFit({ db }: Deps, kind: FitKind): Promise<FitInForce | null> {
  const current = await CurrentFit.findByPk(kind);
  if (!current) return null;
  const known = parsed.get(db)?.get(kind);
  if (known?.id === current.fitId) return known;
  const fit = await Fit.findByPk(current.fitId, { rejectOnEmpty: true });
  const found = { id: fit.id, fittedAt: fit.createdAt, output: fitOutputSchema.parse(fit.curves) };
  parsed.set(db, new Map(parsed.get(db)).set(kind, found));
  return found;
}
