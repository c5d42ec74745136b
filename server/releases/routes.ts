import {
  makeReleaseSchema,
  releaseFileParamsSchema,
  releaseListSchema,
  releasePreviewSchema,
  releaseQueuedSchema,
} from '@/lib/contract/releases';

import { AppError } from '../errors';
import { rawRoute, route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { presentRelease } from './present';
import { previewRelease } from './previewRelease';
import { findReleaseFile, findReleases } from './queries';
import { requestRelease } from './requestRelease';
import { sendFile } from './sendFile';

export const releaseRoutes: Route[] = [
  route({
    method: 'get',
    path: '/releases',
    policy: 'releases.read',
    response: releaseListSchema,
    handle: async () => ({ releases: (await findReleases()).map(presentRelease) }),
  }),
  route({
    method: 'get',
    path: '/releases/preview',
    policy: 'releases.make',
    response: releasePreviewSchema,
    handle: ({ deps }) => previewRelease(deps),
  }),
  route({
    method: 'post',
    path: '/releases',
    policy: 'releases.make',
    body: makeReleaseSchema,
    response: releaseQueuedSchema,
    status: 202,
    async handle({ deps, actor, body }) {
      await requestRelease(deps, signedInActor(actor), body);
      return { isMaking: true as const };
    },
  }),
  rawRoute({
    method: 'get',
    path: '/releases/:number/files/:name',
    policy: 'releases.read',
    params: releaseFileParamsSchema,
    async handle({ deps, params: { number, name } }) {
      const file = await findReleaseFile(number, name);
      if (!file) throw new AppError('notFound', 'There is no such file of a release.');
      return { send: (exchange) => sendFile(file, deps.storage, exchange) };
    },
  }),
];
