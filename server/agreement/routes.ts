import { z } from 'zod';

import {
  agreementSchema,
  blindListSchema,
  blindOutcomeSchema,
  blindSubmissionSchema,
  blindVerdictRequestSchema,
} from '@/lib/contract/agreement';
import { idSchema } from '@/lib/contract/fields';

import { BlindReview } from '../db/models';
import { AppError } from '../errors';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { blindSubmission } from './blindSubmission';
import { assignReviewers } from './drawForReview';
import { giveVerdict } from './giveVerdict';
import { presentAgreement, presentWaiting } from './present';
import { findDone, findReview, findWaitingFor } from './queries';

const reviewParams = z.object({ reviewId: idSchema });

export const agreementRoutes: Route[] = [
  route({
    method: 'get',
    path: '/agreement',
    policy: 'agreement.read',
    response: agreementSchema,
    async handle({ actor }) {
      const [done, drawn, waiting] = await Promise.all([
        findDone(),
        BlindReview.count(),
        findWaitingFor(signedInActor(actor)),
      ]);
      return presentAgreement(done, { drawn, waiting: waiting.length });
    },
  }),
  route({
    method: 'get',
    path: '/blind-reviews',
    policy: 'agreement.review',
    response: blindListSchema,
    async handle({ deps, actor }) {
      await deps.db.transaction((transaction) => assignReviewers(deps.config.sampleSeed, transaction));
      return presentWaiting(await findWaitingFor(signedInActor(actor)));
    },
  }),
  route({
    method: 'get',
    path: '/blind-reviews/:reviewId',
    policy: 'agreement.review',
    params: reviewParams,
    response: blindSubmissionSchema,
    async handle({ deps, actor, params: { reviewId } }) {
      const reader = signedInActor(actor);
      const review = await findReview(reader, reviewId);
      if (review.doneAt) throw new AppError('conflict', 'You have given your verdict on this one.');
      return blindSubmission(deps, reader, review);
    },
  }),
  route({
    method: 'post',
    path: '/blind-reviews/:reviewId',
    policy: 'agreement.review',
    params: reviewParams,
    body: blindVerdictRequestSchema,
    response: blindOutcomeSchema,
    handle: ({ deps, actor, params, body }) => giveVerdict(deps, signedInActor(actor), params.reviewId, body),
  }),
];
