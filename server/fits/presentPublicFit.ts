import { standardUse } from '@/lib/contract/cells';
import {
  type FitBin,
  type FitInteraction,
  type PastFit,
  type PublicFit,
  type PublishedFitReport,
  residualConditionSchema,
} from '@/lib/contract/fits';
import { minimumOwners } from '@/lib/contract/limits';
import { bandsByLever } from '@/lib/fit';

import type { Fit } from '../db/models';
import { tellCount, tellEvidence } from '../publicView/tellCounts';
import type { FitInForce } from './currentFit';
import type { Bin } from './fitOutput';
import { type FitDiagnostics, readDiagnostics, readParameters } from './storedFit';

type Names = ReadonlyMap<string, string>;

/** The public fit with what it is checked by, for everyone. Checks and banks it names are left out here, one by one. */
export function presentPublicFit(
  inForce: FitInForce | null,
  stored: Fit | null,
  past: readonly Fit[],
  names: Names,
): PublicFit {
  return {
    use: standardUse,
    fit: inForce && stored ? presentReport(inForce, stored) : null,
    history: past.flatMap((fit) => presentPast(fit, names)),
  };
}

function presentReport({ fittedAt, output }: FitInForce, stored: Fit): PublishedFitReport | null {
  const parameters = readParameters(stored);
  const diagnostics = readDiagnostics(stored);
  const { pool, model, effects, coverage, bins } = output;
  if (!parameters || !diagnostics || pool.evidence.owners < minimumOwners) return null;
  return {
    ...{ effects, coverage, fittedAt: fittedAt.toISOString(), codeVersion: stored.codeVersion },
    ...{ evidence: tellEvidence(pool.evidence), iterations: diagnostics.iterations },
    ...{ reachYears: model.reach.years, reachEfc: model.reach.efc, average: parameters.average },
    exponents: parameters.exponents,
    parameters: parameters.parameters.map(({ priorShare, ...parameter }) => ({
      ...parameter,
      priorShareFraction: priorShare,
      source: model.priors.find(({ name }) => name === parameter.name)?.source ?? '',
    })),
    residuals: residualConditionSchema.options.map((condition) => ({
      condition,
      bins: binsIn(bins, `residual:${condition}`),
    })),
    predicted: binsIn(bins, 'predicted'),
    strata: presentStrata(bins),
    ...presentContrasts(diagnostics, model.reach),
    reliability: {
      temperatureFraction: diagnostics.reliability.temperature,
      socFraction: diagnostics.reliability.soc,
    },
    statements: publicStatements(diagnostics),
  };
}

function binsIn(bins: readonly Bin[], series: string): FitBin[] {
  return bins.flatMap(({ series: own, from, to, summary }) =>
    own === series && summary ? [{ from, to, ...summary, evidence: tellEvidence(summary.evidence) }] : [],
  );
}

function presentStrata(bins: readonly Bin[]): PublishedFitReport['strata'] {
  return bandsByLever.heat.flatMap((heat) =>
    bandsByLever.rate.flatMap((rate) =>
      bandsByLever.clamping.flatMap((held) => {
        const own = binsIn(bins, `strata:${heat.key}:${rate.key}:${held.key}`);
        const isClamped = held.key === 'clamping-held';
        return own.length > 0 ? [{ heat: heat.label, rate: rate.label, isClamped, bins: own }] : [];
      }),
    ),
  );
}

/** Comparisons of clamped and unclamped banks, where at least five owners must stand on either side. */
function presentContrasts(
  { matched, balance, interactions, mostBanksOfOwner }: FitDiagnostics,
  pool: { clampedBanks: number; unclampedBanks: number },
): Pick<PublishedFitReport, 'matched' | 'balance' | 'interactions'> {
  // Counts of banks only: so many owners there are at the least.
  const isEnough = (sides: { clamped: number; unclamped: number }) =>
    Math.min(sides.clamped, sides.unclamped) >= minimumOwners * mostBanksOfOwner;
  const { lnDifference, lower, upper, modelLnDifference, classes, banks } = matched;
  const hasMatched = lnDifference !== null && lower !== null && upper !== null && modelLnDifference !== null;
  return {
    matched:
      hasMatched && isEnough(banks)
        ? {
            capacityRatio: {
              estimate: Math.exp(lnDifference),
              lower: Math.exp(lower),
              upper: Math.exp(upper),
            },
            modelCapacityRatio: Math.exp(modelLnDifference),
            classes,
            banks: tellSides(banks),
          }
        : null,
    balance: isEnough({ clamped: pool.clampedBanks, unclamped: pool.unclampedBanks })
      ? balance.flatMap(({ condition, clampedMean, unclampedMean, standardisedDifference }) =>
          clampedMean === null || unclampedMean === null || standardisedDifference === null
            ? []
            : [{ condition, clampedMean, unclampedMean, standardisedDifference }],
        )
      : null,
    interactions: interactions.map(({ lever, cut, estimate, se, isShown, banksAbove }): FitInteraction => ({
      ...{ lever, cut },
      effect: isEnough(banksAbove) ? { estimate, se, isShown, banks: tellSides(banksAbove) } : null,
    })),
  };
}

const tellSides = ({ clamped, unclamped }: { clamped: number; unclamped: number }) => ({
  clamped: tellCount(clamped),
  unclamped: tellCount(unclamped),
});

/** Sentences without a number: those that count banks or name them may be of a single owner. */
const publicStatements = ({ statements }: FitDiagnostics): string[] =>
  statements.filter((sentence) => !/\d/.test(sentence));

function presentPast(fit: Fit, names: Names): PastFit[] {
  const read = readParameters(fit);
  if (!read || fit.owners < minimumOwners) return [];
  const { owners, banks, checks, createdAt, codeVersion } = fit;
  return [
    {
      ...{
        codeVersion,
        fittedAt: createdAt.toISOString(),
        evidence: tellEvidence({ owners, banks, checks }),
      },
      average: read.average,
      lives: read.lives.flatMap(({ cellType: id, years, status }) => {
        const name = names.get(id);
        return name === undefined ? [] : [{ cellType: { id, name }, years, status }];
      }),
    },
  ];
}
