import { z } from 'zod';

import { idSchema } from '@/lib/contract/fields';
import {
  healthRecordListSchema,
  healthRecordSchema,
  issuedRecordSchema,
  sharedRecordSchema,
} from '@/lib/contract/records';

import { hashToken } from '../accounts/secretTokens';
import { findOwnBank } from '../banks/queries';
import { HealthRecord } from '../db/models';
import { AppError } from '../errors';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { issueRecord } from './issueRecord';
import { presentRecord, presentShared } from './present';
import { revokeRecord } from './revokeRecord';

const bankParams = z.object({ bankId: idSchema });
const recordParams = z.object({ recordId: idSchema });
const tokenParams = z.object({ recordToken: z.string().regex(/^[\w-]{43}$/) });

export const recordRoutes: Route[] = [
  route({
    method: 'get',
    path: '/banks/:bankId/records',
    policy: 'records.list',
    params: bankParams,
    response: healthRecordListSchema,
    async handle({ actor, params: { bankId } }) {
      await findOwnBank(actor, 'records.list', bankId);
      const records = await HealthRecord.findAll({
        where: { bankId },
        order: [
          ['issuedAt', 'DESC'],
          ['id', 'ASC'],
        ],
      });
      return { records: records.map(presentRecord) };
    },
  }),
  route({
    method: 'post',
    path: '/banks/:bankId/records',
    policy: 'records.create',
    limit: 'submission',
    params: bankParams,
    response: issuedRecordSchema,
    status: 201,
    async handle({ deps, actor, params }) {
      const { record, token } = await issueRecord(deps, signedInActor(actor), params.bankId);
      return { record: presentRecord(record), token };
    },
  }),
  route({
    method: 'post',
    path: '/records/:recordId/revoke',
    policy: 'records.revoke',
    params: recordParams,
    response: healthRecordSchema,
    handle: async ({ deps, actor, params }) =>
      presentRecord(await revokeRecord(deps, signedInActor(actor), params.recordId)),
  }),
  route({
    method: 'get',
    path: '/records/:recordToken',
    policy: 'records.readShared',
    limit: 'sharedLink',
    params: tokenParams,
    response: sharedRecordSchema,
    async handle({ params: { recordToken }, res }) {
      res.setHeader('X-Robots-Tag', 'noindex, nofollow');
      const record = await HealthRecord.findOne({ where: { tokenHash: hashToken(recordToken) } });
      if (!record)
        throw new AppError(
          'notFound',
          'There is no health record under this link. Check that it is complete.',
        );
      return presentShared(record);
    },
  }),
];
