import { z } from 'zod';

import {
  catalogueSchema,
  cataloguePageSchema,
  claimRequestSchema,
  declineCellTypeRequestSchema,
  editCellTypeRequestSchema,
  listCellTypeRequestSchema,
  mergeCellTypesRequestSchema,
  mergePreviewSchema,
  removeClaimQuerySchema,
} from '@/lib/contract/catalogue';
import { cellParamsSchema } from '@/lib/contract/cells';
import { cellIdSchema, idSchema } from '@/lib/contract/fields';

import type { Deps } from '../deps';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { addClaim, editClaim, removeClaim } from './claims';
import { editCellType } from './editCellType';
import { mergeCellTypes, planMerge } from './mergeCellTypes';
import { presentCataloguePage, presentEntry, presentMergePreview } from './present';
import { countDependents, findCatalogue, findCellTypeTrail, findClaimsOf, findEntry } from './queries';
import { declineCellType, listCellType } from './settleProposal';

const claimParams = cellParamsSchema.extend({ claimId: idSchema });

/** The page as it stands after a change. */
async function pageOf({ db }: Deps, id: string) {
  const [cellType, countOf, claims, trail] = await Promise.all([
    findEntry(id),
    countDependents(db, { cellTypeId: id }),
    findClaimsOf(id),
    findCellTypeTrail(id),
  ]);
  return presentCataloguePage(cellType, { counts: countOf(id), claims, trail });
}

const change = {
  policy: 'catalogue.update',
  params: cellParamsSchema,
  response: cataloguePageSchema,
} as const;

export const catalogueRoutes: Route[] = [
  route({
    method: 'get',
    path: '/catalogue',
    policy: 'catalogue.read',
    response: catalogueSchema,
    async handle({ deps }) {
      const [cellTypes, countOf] = await Promise.all([findCatalogue(), countDependents(deps.db)]);
      return { cellTypes: cellTypes.map((one) => presentEntry(one, countOf(one.id))) };
    },
  }),
  route({
    method: 'get',
    path: '/catalogue/:cellId',
    policy: 'catalogue.read',
    params: cellParamsSchema,
    response: cataloguePageSchema,
    handle: ({ deps, params }) => pageOf(deps, params.cellId),
  }),
  route({
    ...change,
    method: 'put',
    path: '/catalogue/:cellId',
    body: editCellTypeRequestSchema,
    async handle({ deps, actor, params: { cellId }, body }) {
      const { version, isRecomputeAccepted, ...fields } = body;
      await editCellType(deps, signedInActor(actor), cellId, { version, isRecomputeAccepted, fields });
      return pageOf(deps, cellId);
    },
  }),
  route({
    ...change,
    method: 'post',
    path: '/catalogue/:cellId/list',
    body: listCellTypeRequestSchema,
    async handle({ deps, actor, params: { cellId }, body }) {
      await listCellType(deps, signedInActor(actor), cellId, body.version);
      return pageOf(deps, cellId);
    },
  }),
  route({
    ...change,
    method: 'post',
    path: '/catalogue/:cellId/decline',
    body: declineCellTypeRequestSchema,
    async handle({ deps, actor, params: { cellId }, body }) {
      await declineCellType(deps, signedInActor(actor), cellId, body);
      return pageOf(deps, cellId);
    },
  }),
  route({
    method: 'get',
    path: '/catalogue/:cellId/merge',
    policy: 'catalogue.read',
    params: cellParamsSchema,
    query: z.object({ intoId: cellIdSchema }),
    response: mergePreviewSchema,
    handle: async ({ deps, params, query }) =>
      presentMergePreview(await planMerge(deps, params.cellId, query.intoId)),
  }),
  route({
    ...change,
    method: 'post',
    path: '/catalogue/:cellId/merge',
    body: mergeCellTypesRequestSchema,
    async handle({ deps, actor, params: { cellId }, body }) {
      await mergeCellTypes(deps, signedInActor(actor), cellId, body);
      return pageOf(deps, body.intoId);
    },
  }),
  route({
    ...change,
    method: 'post',
    path: '/catalogue/:cellId/claims',
    body: claimRequestSchema,
    async handle({ deps, actor, params: { cellId }, body: { version, claim } }) {
      await addClaim(deps, signedInActor(actor), { cellTypeId: cellId, version }, claim);
      return pageOf(deps, cellId);
    },
  }),
  route({
    ...change,
    method: 'put',
    path: '/catalogue/:cellId/claims/:claimId',
    params: claimParams,
    body: claimRequestSchema,
    async handle({ deps, actor, params: { cellId, claimId }, body: { version, claim } }) {
      await editClaim(deps, signedInActor(actor), { cellTypeId: cellId, version, claimId }, claim);
      return pageOf(deps, cellId);
    },
  }),
  route({
    ...change,
    method: 'delete',
    path: '/catalogue/:cellId/claims/:claimId',
    params: claimParams,
    query: removeClaimQuerySchema,
    async handle({ deps, actor, params: { cellId, claimId }, query: { version } }) {
      await removeClaim(deps, signedInActor(actor), { cellTypeId: cellId, version, claimId });
      return pageOf(deps, cellId);
    },
  }),
];
