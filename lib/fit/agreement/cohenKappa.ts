import { normalQuantile } from '../distributions';

export interface Kappa {
  ok: true;
  /** Cases judged by both. */
  cases: number;
  /** Share of cases on which both found the same. */
  agreedFraction: number;
  /** Agreement beyond chance: 1 whole, 0 no more than chance. */
  estimate: number;
  /** Large-sample standard error. */
  se: number;
  lower: number;
  upper: number;
}

/**
 * Cohen's kappa of two raters from their table of counts (first rater by row, second by column, the same categories in
 * the same order), with its large-sample standard error and normal interval, cut off at -1 and 1.
 * Sources: J. Cohen 1960, Educ. Psychol. Meas. 20, 37-46; standard error: J. L. Fleiss, J. Cohen and B. S. Everitt
 * 1969, Psychol. Bull. 72, 323-327.
 *
 * Returns `{ ok: false }` where no case was judged, or all of them fell into one category for both: chance alone would
 * agree then. Throws RangeError for a table that is not square, counts that are not whole and at least 0, or a
 * confidence outside (0, 1).
 */
export function cohenKappa(
  counts: readonly (readonly number[])[],
  confidence = 0.9,
): Kappa | { ok: false; reason: 'noCases' | 'oneCategory' } {
  if (!counts.every((row) => row.length === counts.length))
    throw new RangeError('cohenKappa requires a square table');
  if (!counts.flat().every((count) => Number.isInteger(count) && count >= 0))
    throw new RangeError('cohenKappa requires whole counts');
  if (!(confidence > 0 && confidence < 1)) throw new RangeError('cohenKappa requires a confidence in (0, 1)');
  const cases = sum(counts.flat());
  if (cases === 0) return { ok: false, reason: 'noCases' };
  const shares = counts.map((row) => row.map((count) => count / cases));
  const first = shares.map(sum);
  const second = shares.map((_, j) => sum(shares.map((row) => row[j]!)));
  const agreed = sum(shares.map((row, i) => row[i]!));
  const byChance = sum(first.map((share, i) => share * second[i]!));
  if (byChance >= 1) return { ok: false, reason: 'oneCategory' };
  const estimate = (agreed - byChance) / (1 - byChance);
  const apart = 1 - estimate;
  const diagonal = sum(shares.map((row, i) => row[i]! * (1 - (first[i]! + second[i]!) * apart) ** 2));
  const beside = sum(
    shares.flatMap((row, i) => row.map((share, j) => (i === j ? 0 : share * (second[i]! + first[j]!) ** 2))),
  );
  const variance = diagonal + apart ** 2 * beside - (estimate - byChance * apart) ** 2;
  const se = Math.sqrt(Math.max(variance, 0) / cases) / (1 - byChance);
  const half = normalQuantile(0.5 + confidence / 2) * se;
  return {
    ok: true,
    ...{ cases, agreedFraction: agreed, estimate, se },
    lower: Math.max(estimate - half, -1),
    upper: Math.min(estimate + half, 1),
  };
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
