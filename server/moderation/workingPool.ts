import type { Sequelize } from 'sequelize';
import { z } from 'zod';

import { largeInfluenceInSe } from '@/lib/contract/moderation';
import type { InputReliability, PublishedFit } from '@/lib/fit';

import { Fit } from '../db/models';
import type { Deps } from '../deps';
import { findCurrentFit } from '../fits/currentFit';

export interface Influence {
  parameter: string;
  shiftInSe: number;
}

/** What the screening takes from the working fit in force. */
export interface WorkingPool {
  fitId: string;
  model: PublishedFit;
  /** Checks that the fit itself set aside as outliers: nothing is predicted from them. */
  setAside: Set<string>;
  /** The figure that a bank moves most, of banks that move one by more than 0.3 of its standard error. */
  influence: Map<string, Influence>;
  /** How much of the spread of guessed conditions is real. */
  reliability: InputReliability;
}

const diagnosticsSchema = z.object({
  screen: z.array(z.object({ checkId: z.string(), action: z.string() })).default([]),
  influence: z
    .array(z.object({ bankId: z.string(), parameter: z.string(), shiftInSe: z.number() }))
    .default([]),
  reliability: z.object({ temperature: z.number(), soc: z.number() }).default({ temperature: 1, soc: 1 }),
});

/** Read once per fit. */
const known = new WeakMap<Sequelize, WorkingPool>();

/** The working fit as the screening uses it, or null before the first. */
export async function findWorkingPool(deps: Deps): Promise<WorkingPool | null> {
  const working = await findCurrentFit(deps, 'working');
  if (!working) return null;
  const before = known.get(deps.db);
  if (before?.fitId === working.id) return before;
  const fit = await Fit.findByPk(working.id, { attributes: ['diagnostics'], rejectOnEmpty: true });
  const { screen, influence, reliability } = diagnosticsSchema.parse(fit.diagnostics ?? {});
  const pool: WorkingPool = {
    fitId: working.id,
    model: working.output.model,
    setAside: new Set(screen.filter(({ action }) => action === 'quarantine').map(({ checkId }) => checkId)),
    influence: largestOf(influence),
    reliability,
  };
  known.set(deps.db, pool);
  return pool;
}

function largestOf(all: ({ bankId: string } & Influence)[]): Map<string, Influence> {
  const largest = new Map<string, Influence>();
  for (const { bankId, ...influence } of all) {
    const size = Math.abs(influence.shiftInSe);
    if (size <= largeInfluenceInSe || size <= Math.abs(largest.get(bankId)?.shiftInSe ?? 0)) continue;
    largest.set(bankId, influence);
  }
  return largest;
}
