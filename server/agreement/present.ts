import { type Agreement, type BlindList, type Verdict, verdictSchema } from '@/lib/contract/agreement';
import { cohenKappa } from '@/lib/fit';

import { presentCellTypeBrief } from '../cellTypes/present';
import { firstVerdict } from './giveVerdict';
import type { LoadedReview } from './queries';

export function presentWaiting(reviews: readonly LoadedReview[]): BlindList {
  return {
    reviews: reviews.map(({ id, drawnAt, check: { bank } }) => ({
      reviewId: id,
      pseudonym: bank.pseudonym,
      cellType: presentCellTypeBrief(bank.cellType),
      layout: `${bank.parallel}p${bank.series}s`,
      drawnAt: drawnAt.toISOString(),
    })),
  };
}

const verdicts = verdictSchema.options;

/** How far two moderators agree, and where they did not. */
export function presentAgreement(
  done: readonly LoadedReview[],
  { drawn, waiting }: { drawn: number; waiting: number },
): Agreement {
  const pairs = done.map((review) => ({
    review,
    first: firstVerdict(review.decision.action),
    second: review.verdict!,
  }));
  const counts = verdicts.map((row) =>
    verdicts.map((column) => pairs.filter(({ first, second }) => first === row && second === column).length),
  );
  const kappa = cohenKappa(counts);
  const agreed = pairs.filter(({ first, second }) => first === second).length;
  return {
    ...{ drawn, waiting, done: pairs.length, verdicts: [...verdicts], counts },
    agreedFraction: pairs.length > 0 ? agreed / pairs.length : null,
    kappa: kappa.ok
      ? { estimate: kappa.estimate, lower: kappa.lower, upper: kappa.upper, se: kappa.se }
      : null,
    differing: pairs.filter(({ first, second }) => first !== second).map(presentDiffering),
  };
}

function presentDiffering(pair: {
  review: LoadedReview;
  first: Verdict;
  second: Verdict;
}): Agreement['differing'][number] {
  const { review, first, second } = pair;
  const { bank } = review.check;
  return {
    checkId: review.checkId,
    pseudonym: bank.pseudonym,
    cellType: presentCellTypeBrief(bank.cellType),
    ...{ first, firstWords: review.decision.words, second, secondWords: review.words },
    doneAt: review.doneAt!.toISOString(),
  };
}
