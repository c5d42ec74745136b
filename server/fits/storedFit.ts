import { z } from 'zod';

import { evidenceSchema, lifeSchema, standardUse } from '@/lib/contract/cells';
import { averageFigure, type MatchedContrast, type PooledFit } from '@/lib/fit';
import type { Fit } from '../db/models';
import type { PoolMember } from '../pool/poolRow';

import type { FitOutput } from './fitOutput';

const parameterSchema = z.object({
  name: z.string(),
  estimate: z.number(),
  se: z.number(),
  priorMean: z.number(),
  priorSd: z.number(),
  priorShare: z.number(),
});

const shortLifeSchema = lifeSchema.pick({ years: true, status: true });

/** The column `parameters` of a fit: small enough to read for every run of the history. */
export const fitParametersSchema = z.object({
  parameters: z.array(parameterSchema),
  exponents: z.array(z.object({ exponent: z.number(), weight: z.number() })),
  /** At the standard use: the average cell type, and each that has a figure of its own. */
  average: shortLifeSchema,
  lives: z.array(shortLifeSchema.extend({ cellType: z.string() })),
});
export type FitParameters = z.infer<typeof fitParametersSchema>;

const sidesSchema = z.object({ clamped: z.number(), unclamped: z.number() });

/** The column `diagnostics` of a fit. It names checks and banks: what is public of it is picked out one by one. */
export const fitDiagnosticsSchema = z.object({
  iterations: z.number(),
  totalIterations: z.number(),
  objective: z.number(),
  used: evidenceSchema,
  screenRounds: z.number(),
  screen: z.array(
    z.object({
      checkId: z.string(),
      bankId: z.string(),
      t: z.number(),
      action: z.enum(['quarantine', 'list']),
    }),
  ),
  excluded: z.array(z.object({ checkId: z.string(), bankId: z.string(), reason: z.string() })),
  influence: z.array(z.object({ bankId: z.string(), parameter: z.string(), shiftInSe: z.number() })),
  balance: z.array(
    z.object({
      condition: z.enum([
        'depthFraction',
        'dischargeIt',
        'temperatureC',
        'socMeanFraction',
        'ageYears',
        'efcPerYear',
      ]),
      clampedMean: z.number().nullable(),
      unclampedMean: z.number().nullable(),
      standardisedDifference: z.number().nullable(),
    }),
  ),
  interactions: z.array(
    z.object({
      lever: z.enum(['rate', 'depth', 'heat']),
      cut: z.number(),
      estimate: z.number(),
      se: z.number(),
      isShown: z.boolean(),
      banksAbove: sidesSchema,
    }),
  ),
  matched: z.object({
    lnDifference: z.number().nullable(),
    lower: z.number().nullable(),
    upper: z.number().nullable(),
    modelLnDifference: z.number().nullable(),
    classes: z.number(),
    banks: sidesSchema,
  }) satisfies z.ZodType<MatchedContrast>,
  reliability: z.object({ temperature: z.number(), soc: z.number() }),
  /** The most banks that one owner has in the pool: a count of banks over it is a least count of owners. */
  mostBanksOfOwner: z.number(),
  statements: z.array(z.string()),
  /** Why single curves of bands are missing, counted. */
  refusals: z.record(z.string(), z.number()),
});
export type FitDiagnostics = z.infer<typeof fitDiagnosticsSchema>;

type Stored = Pick<Fit, 'parameters' | 'diagnostics'>;

/** Null for a run that failed, or of older code. */
export const readParameters = ({ parameters }: Stored): FitParameters | null =>
  fitParametersSchema.safeParse(parameters).data ?? null;

export const readDiagnostics = ({ diagnostics }: Stored): FitDiagnostics | null =>
  fitDiagnosticsSchema.safeParse(diagnostics).data ?? null;

/** Ids of the banks that diagnostics speak of, also within sentences. */
export function banksNamedIn({ screen, excluded, influence, statements }: FitDiagnostics): string[] {
  const inSentences = statements.flatMap(
    (sentence) => sentence.match(/[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}/g) ?? [],
  );
  return [
    ...new Set([...[...screen, ...excluded, ...influence].map(({ bankId }) => bankId), ...inSentences]),
  ];
}

export function parametersOf(fit: PooledFit, { figures, views }: FitOutput): FitParameters {
  const { years, status } = averageFigure(fit, standardUse);
  const isTold = (cellType: string) =>
    views.some((view) => view.cellType === cellType && view.bandKey === null && view.evidence !== null);
  return {
    parameters: fit.parameters,
    exponents: fit.components.map(({ exponent, weight }) => ({ exponent, weight })),
    average: { years, status },
    lives: figures
      .filter(({ cellType }) => isTold(cellType))
      .map(({ cellType, life }) => ({ cellType, years: life.years, status: life.status })),
  };
}

const bankNumbers = /\bbank\d{7}\b/g;

/** A bank's name within one fit. */
export const bankNumber = (place: number): string => `bank${String(place).padStart(7, '0')}`;

/** @param bankOf ids of the banks by their numbers in the fit */
export function diagnosticsOf(
  fit: PooledFit,
  members: readonly PoolMember[],
  { views }: FitOutput,
  bankOf: ReadonlyMap<string, string>,
): FitDiagnostics {
  const { iterations, totalIterations, objective, data, screenRounds, balance, interactions } = fit;
  const { matched, reliability } = fit;
  const idOf = (number: string) => bankOf.get(number) ?? number;
  return {
    ...{ iterations, totalIterations, objective, screenRounds, balance, interactions, matched, reliability },
    statements: fit.statements.map((sentence) => sentence.replaceAll(bankNumbers, idOf)),
    used: { owners: data.owners, banks: data.banks, checks: data.used },
    screen: fit.screen.map(({ row, bank, t, action }) => ({
      checkId: members[row]!.checkId,
      bankId: idOf(bank),
      ...{ t, action },
    })),
    excluded: fit.excluded.map(({ row, bank, reason }) => ({
      checkId: members[row]!.checkId,
      bankId: idOf(bank),
      reason,
    })),
    influence: fit.influence.map(({ bank, parameter, shiftInSe }) => ({
      bankId: idOf(bank),
      ...{ parameter, shiftInSe },
    })),
    mostBanksOfOwner: mostBanksOfOwner(members),
    refusals: countRefusals(views),
  };
}

function mostBanksOfOwner(members: readonly PoolMember[]): number {
  const banksOf = new Map<string, Set<string>>();
  for (const { row } of members) banksOf.set(row.owner, (banksOf.get(row.owner) ?? new Set()).add(row.bank));
  return Math.max(0, ...[...banksOf.values()].map(({ size }) => size));
}

function countRefusals(views: FitOutput['views']): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const { result } of views)
    if (result && !result.ok) counts[result.reason] = (counts[result.reason] ?? 0) + 1;
  return counts;
}
