import type { Request } from 'express';

import { consent } from '@/lib/contract/consent';
import {
  earlierReportSchema,
  previewEarlierRequestSchema,
  sendEarlierRequestSchema,
  templateQuerySchema,
} from '@/lib/contract/earlierChecks';
import { limits } from '@/lib/contract/limits';

import { findBanksOf } from '../banks/queries';
import { AppError } from '../errors';
import { rawRoute, route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { receiveTable } from '../uploads/receiveFile';
import { readTable, type Table } from './readTable';
import { storeEarlierChecks } from './storeEarlierChecks';
import { earlierTemplate } from './template';

function tableOf({ file }: Request): Table {
  if (!file) throw new AppError('invalid', undefined, { file: 'Choose a file.' });
  return readTable(file.buffer);
}

export const earlierCheckRoutes: Route[] = [
  rawRoute({
    method: 'get',
    path: '/earlier-checks/template.csv',
    policy: 'earlierChecks.send',
    query: templateQuerySchema,
    async handle({ actor, query }) {
      const banks = await findBanksOf(signedInActor(actor).userId);
      const content = earlierTemplate({ ...query, bankNames: banks.map(({ name }) => name) });
      return { type: 'text/csv; charset=utf-8', filename: 'ebbline-earlier-checks.csv', content };
    },
  }),
  route({
    method: 'post',
    path: '/earlier-checks/preview',
    policy: 'earlierChecks.send',
    limit: 'upload',
    before: receiveTable(limits.tableBytes.max),
    body: previewEarlierRequestSchema,
    response: earlierReportSchema,
    handle: async ({ deps, actor, body: { bankId }, req }) =>
      storeEarlierChecks(deps, signedInActor(actor), {
        ...{ table: tableOf(req), bankId, choice: 'preview', consent: consent.version },
      }),
  }),
  route({
    method: 'post',
    path: '/earlier-checks',
    policy: 'earlierChecks.send',
    limit: 'submission',
    before: receiveTable(limits.tableBytes.max),
    body: sendEarlierRequestSchema,
    response: earlierReportSchema,
    async handle({ deps, actor, body: { bankId, choice, digest }, req }) {
      const table = tableOf(req);
      if (table.digest !== digest)
        throw new AppError('conflict', 'The file was changed since its rows were shown. Look at them again.');
      const request = { table, bankId, choice, consent: consent.version };
      return storeEarlierChecks(deps, signedInActor(actor), request);
    },
  }),
];
