import type { Request, Response } from 'express';

import { rawRoute, type Route } from '../http/route';
import { type Answer, type Endpoint, endpoints } from './endpoints';
import { openApiDocument } from './openApi';

const secondsKept = 300;

/** The public API: read-only, for programs of anyone, from any origin. */
export const publicApiRoutes: Route[] = [
  rawRoute({
    method: 'get',
    path: '/v1/openapi.json',
    policy: 'publicApi.read',
    limit: 'publicApi',
    handle: async () => ({ send: async ({ res }) => sendJson(res, openApiDocument()) }),
  }),
  ...endpoints.map(bind),
];

function bind({ path, params, query, response, read }: Endpoint): Route {
  return rawRoute({
    method: 'get',
    path: `/v1${path.replace(/\{(\w+)\}/g, ':$1')}`,
    policy: 'publicApi.read',
    limit: 'publicApi',
    params,
    query,
    async handle(input) {
      const answer = await read(input.deps, { params: input.params, query: input.query });
      const body = response.parse(answer.body);
      return { send: async (exchange) => send({ ...answer, body }, exchange) };
    },
  });
}

function send({ body, csv, next }: Answer, { req, res }: { req: Request; res: Response }): void {
  res.vary('Accept');
  if (next) res.links({ next: `/api/v1${next}` });
  if (csv && req.accepts(['json', 'csv']) === 'csv') {
    keepAWhile(res);
    res.type('csv').send(csv());
  } else sendJson(res, body);
}

function sendJson(res: Response, body: unknown): void {
  keepAWhile(res);
  res.json(body);
}

const keepAWhile = (res: Response) => res.setHeader('Cache-Control', `public, max-age=${secondsKept}`);
