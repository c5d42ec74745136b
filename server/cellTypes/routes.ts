import { cellTypeChoiceSchema, cellTypeListSchema } from '@/lib/contract/banks';
import { proposeCellTypeRequestSchema } from '@/lib/contract/proposals';

import { AppError } from '../errors';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { presentCellTypeChoice } from './present';
import { proposeCellType } from './proposeCellType';
import { findChoosableCellType, findChoosableCellTypes } from './queries';

export const cellTypeRoutes: Route[] = [
  route({
    method: 'get',
    path: '/cell-types',
    policy: 'cellTypes.read',
    response: cellTypeListSchema,
    async handle({ actor }) {
      const cellTypes = await findChoosableCellTypes(actor.role === 'visitor' ? null : actor.userId);
      return { cellTypes: cellTypes.map(presentCellTypeChoice) };
    },
  }),
  route({
    method: 'post',
    path: '/cell-types',
    policy: 'cellTypes.propose',
    limit: 'submission',
    body: proposeCellTypeRequestSchema,
    response: cellTypeChoiceSchema,
    status: 201,
    async handle({ deps, actor, body }) {
      const proposer = signedInActor(actor);
      const cellType = await findChoosableCellType(
        await proposeCellType(deps, proposer, body),
        proposer.userId,
      );
      if (!cellType) throw new AppError('notFound');
      return presentCellTypeChoice(cellType);
    },
  }),
];
