import { z } from 'zod';

import { limits } from '@/lib/contract/limits';
import { photoSchema } from '@/lib/contract/uploads';

import { rawRoute, route, type Route } from '../http/route';
import { type Actor, signedInActor } from '../policies';
import { bankParamsSchema, photoParamsSchema } from './params';
import { presentPhoto } from './present';
import { findPhoto, type Photo } from './queries';
import { receiveFile } from './receiveFile';
import { removePhoto } from './removePhoto';
import { type FileStorage, readWhole } from './storage';
import { storePhoto } from './storePhoto';

const readPhoto = (path: string, keyOf: (photo: Photo) => string) =>
  rawRoute({
    method: 'get',
    path,
    policy: 'photos.read',
    params: photoParamsSchema,
    handle: ({ deps, actor, params }) => answerOf(deps.storage, actor, params.photoId, keyOf),
  });

async function answerOf(
  storage: FileStorage,
  actor: Actor,
  photoId: string,
  keyOf: (photo: Photo) => string,
) {
  const photo = await findPhoto(actor, 'photos.read', photoId);
  const content = await readWhole(storage, keyOf(photo));
  return { type: 'image/webp', filename: photo.filename, inline: content };
}

export const photoRoutes: Route[] = [
  route({
    method: 'post',
    path: '/banks/:bankId/photos',
    policy: 'photos.create',
    limit: 'upload',
    params: bankParamsSchema,
    before: receiveFile({ action: 'photos.create', maxBytes: limits.photoBytes.max }),
    response: photoSchema,
    status: 201,
    async handle({ deps, actor, params, req }) {
      const photoId = await storePhoto(deps, signedInActor(actor), params.bankId, req.file);
      return presentPhoto(await findPhoto(actor, 'photos.read', photoId));
    },
  }),
  readPhoto('/photos/:photoId', ({ storageKey }) => storageKey),
  readPhoto('/photos/:photoId/thumb', ({ thumbKey }) => thumbKey),
  route({
    method: 'delete',
    path: '/photos/:photoId',
    policy: 'photos.remove',
    params: photoParamsSchema,
    response: z.object({}),
    async handle({ deps, actor, params }) {
      await removePhoto(deps, signedInActor(actor), params.photoId);
      return {};
    },
  }),
];
