import { standardUse } from '@/lib/contract/cells';
import type { ReleaseFigures } from '@/lib/contract/releases';
import { averageFigure, figureAt, fitPool } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { isNamed } from '../publicView/publishedRow';

export interface ReleaseTask {
  /** In the order of the file, banks by their names in it. */
  rows: PoolCheck[];
  /** Of checks.csv. */
  sha256: string;
}

export type ReleaseOutcome =
  { ok: true; fitJson: string; figures: ReleaseFigures } | { ok: false; reason: string };

/** Fewer banks than this, and a cell type has no figure of its own. */
const minimumBanks = 10;
const headerLines = 1;

/**
 * The fit of a release: what `npm run fit -- checks.csv --json` writes, to the last character, and its figures at the
 * standard use.
 */
export function runReleaseTask({ rows, sha256 }: ReleaseTask): ReleaseOutcome {
  const fit = fitPool(rows, { sha256 });
  if (!fit.ok) return { ok: false, reason: fit.reason };
  // Rows as a reader of the file counts them, with the line of the file beside.
  const inFile = <T extends { row: number }>(entry: T) => ({
    ...entry,
    row: entry.row + 1,
    line: entry.row + 1 + headerLines,
  });
  const answer = { ...fit, screen: fit.screen.map(inFile), excluded: fit.excluded.map(inFile) };
  const own = fit.cellTypes.filter((one) => isNamed(one) && one.banks >= minimumBanks);
  const figures: ReleaseFigures = [
    { cellType: null, ...yearsOf(averageFigure(fit, standardUse)) },
    ...own.map(({ cellType }) => ({ cellType, ...yearsOf(figureAt(fit, standardUse, cellType).life) })),
  ];
  return { ok: true, fitJson: `${JSON.stringify(answer, null, 1)}\n`, figures };
}

const yearsOf = ({ years, status }: Pick<ReleaseFigures[number], 'years' | 'status'>) => ({ years, status });
