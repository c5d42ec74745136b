import type { Request } from 'express';

import { limits } from '@/lib/contract/limits';
import { remapUploadRequestSchema, uploadSchema } from '@/lib/contract/uploads';

import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { bankParamsSchema, uploadParamsSchema } from './params';
import { presentUpload } from './present';
import { findOwnUpload } from './queries';
import { receiveFile } from './receiveFile';
import { remapLog } from './remapLog';
import { storeLog } from './storeLog';

const filesOf = ({ files }: Request) => (Array.isArray(files) ? files : []);

export const uploadRoutes: Route[] = [
  route({
    method: 'post',
    path: '/banks/:bankId/logs',
    policy: 'uploads.create',
    limit: 'upload',
    params: bankParamsSchema,
    before: receiveFile({
      action: 'uploads.create',
      maxBytes: limits.logBytes.max,
      maxFiles: limits.logFiles.max,
    }),
    response: uploadSchema,
    status: 201,
    async handle({ deps, actor, params, req }) {
      const uploadId = await storeLog(deps, signedInActor(actor), params.bankId, filesOf(req));
      return presentUpload(await findOwnUpload(actor, 'uploads.read', uploadId));
    },
  }),
  route({
    method: 'get',
    path: '/uploads/:uploadId',
    policy: 'uploads.read',
    params: uploadParamsSchema,
    response: uploadSchema,
    handle: async ({ actor, params }) =>
      presentUpload(await findOwnUpload(actor, 'uploads.read', params.uploadId)),
  }),
  route({
    method: 'put',
    path: '/uploads/:uploadId/mapping',
    policy: 'uploads.update',
    limit: 'upload',
    params: uploadParamsSchema,
    body: remapUploadRequestSchema,
    response: uploadSchema,
    async handle({ deps, actor, params, body }) {
      await remapLog(deps, signedInActor(actor), params.uploadId, body.mapping);
      return presentUpload(await findOwnUpload(actor, 'uploads.read', params.uploadId));
    },
  }),
];
