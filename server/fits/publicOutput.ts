import { allBands, countFailures, fitStrata, type FitStrataOptions, type PooledFit } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { isNamed } from '../publicView/publishedRow';
import { type Protections, protections } from '../publicView/protections';
import { binsOf, expectChecks } from './bins';
import { fadeBinsOf } from './fadeBins';
import { countsOf, digestsOf, dotsOf, evidenceOf, fitSeed } from './describeRows';
import type { FitOutput, View } from './fitOutput';
import { holdBackBins, holdBackChanges, holdBackRests, holdBackTold } from './holdBackChanges';
import { outputOf, usedRows } from './outputOf';
import { type BankPrice, pricesOf } from './pricesOf';
import { survivalOf } from './survivalOf';

/** Resamples of banks behind the range of a single curve. */
const resamples = 100;

interface PublicOutputOptions {
  /** The public fit in force. */
  previous: FitOutput | null;
  /** What owners of banks of the public pool paid. */
  prices: readonly BankPrice[];
  /** Keys of owners of whom a check was recalled at once: what concerns them moves nevertheless. */
  atOnce?: ReadonlySet<string>;
}

/**
 * What the public fit stores: the pooled model over the public pool, the stratified views of every cell type, and the
 * diagnostic pictures. A view or bin whose change since it was last published concerns fewer than five owners stays as
 * it was; the pooled figures move with the pool's own steps. Pure.
 */
export function publicOutput(
  rows: readonly PoolCheck[],
  fit: PooledFit,
  { previous, prices, atOnce }: PublicOutputOptions,
): FitOutput {
  const expected = expectChecks(usedRows(rows, fit), fit);
  return {
    ...outputOf(rows, fit, expected),
    views: holdBackRests(
      holdBackChanges(stratifiedViews(rows, { bootstrap: resamples }), previous?.views ?? [], atOnce),
    ),
    bins: holdBackBins(
      [...binsOf(expected, fit), ...fadeBinsOf(usedRows(rows, fit))],
      previous?.bins ?? [],
      atOnce,
    ),
    survival: holdBackTold(
      survivalOf(rows),
      previous?.survival ?? [],
      ({ cellType }) => cellType ?? '',
      atOnce,
    ),
    prices: holdBackTold(
      pricesOf(prices),
      previous?.prices ?? [],
      ({ cellType, currency }) => `${cellType}|${currency}`,
      atOnce,
    ),
  };
}

/** Every cell type that is named, whole and in each band, with what may not be told left out. */
export function stratifiedViews(
  rows: readonly PoolCheck[],
  curves: Pick<FitStrataOptions, 'bootstrap' | 'fit'>,
  { minimumOwners: minOwners, maxOwnerShare, isComplementKept }: Protections = protections,
): View[] {
  // A figure over all cell types is on no page; each would be one more to difference by.
  const fitted = fitStrata(rows, {
    ...{ seed: fitSeed, ...curves, minOwners, maxOwnerShare, isComplementKept },
    isByCellTypeOnly: true,
  });
  if (!fitted.ok) throw new Error(`the stratified views ended early: ${fitted.reason}`);
  return fitted.curves.flatMap(({ cellType, bandKey, result }): View[] => {
    if (cellType === null || !isNamed({ cellType })) return [];
    const band = allBands.find(({ key }) => key === bandKey);
    const members = rows.filter((row) => row.cellType === cellType && (!band || band.includes(row)));
    const evidence = evidenceOf(members);
    const isHidden = !result.ok && ['tooFewOwners', 'protectsOthers'].includes(result.reason);
    return [
      {
        cellType,
        bandKey,
        evidence: isHidden ? null : evidence,
        result: bandKey === null ? null : result,
        dots: isHidden ? [] : dotsOf(members),
        owners: isHidden ? {} : digestsOf(members),
        counts: isHidden ? {} : countsOf(members),
        failures: isHidden || bandKey !== null ? null : countFailures(members),
      },
    ];
  });
}
