import type { z } from 'zod';

import { cellPageSchema, cellParamsSchema, cellQuerySchema } from '@/lib/contract/cells';
import { publicFitSchema } from '@/lib/contract/fits';
import {
  apiCellsQuerySchema,
  apiCellsSchema,
  apiChecksQuerySchema,
  apiChecksSchema,
} from '@/lib/contract/publicApi';
import { releaseListSchema } from '@/lib/contract/releases';

import { readCellPage, readCells } from '../cells/read';
import type { Deps } from '../deps';
import { readPublicFit } from '../fits/readPublicFit';
import { presentRelease } from '../releases/present';
import { findReleases } from '../releases/queries';
import { type ChecksPage, readChecks } from './readChecks';

type Parsed<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined;

/** One address of the public API: what the routes and their description are made from. */
export interface Endpoint {
  path: string;
  name: string;
  summary: string;
  /** A request to try, below /api/v1. */
  example: string;
  params: z.ZodObject | undefined;
  query: z.ZodObject | undefined;
  response: z.ZodType;
  read: (deps: Deps, input: { params: unknown; query: unknown }) => Promise<Answer>;
}

/** What an endpoint says: an object, and lines of CSV where it has rows. */
export interface Answer {
  body: unknown;
  csv?: () => string;
  /** Where the next page is, below /api/v1. */
  next?: string;
}

interface EndpointSpec<Params, Query> extends Omit<Endpoint, 'params' | 'query' | 'read'> {
  params?: Params;
  query?: Query;
  read: (deps: Deps, input: { params: Parsed<Params>; query: Parsed<Query> }) => Promise<Answer>;
}

function endpoint<
  Params extends z.ZodObject | undefined = undefined,
  Query extends z.ZodObject | undefined = undefined,
>(spec: EndpointSpec<Params, Query>): Endpoint {
  const { params, query, read, ...rest } = spec;
  return { ...rest, params, query, read: read as Endpoint['read'] };
}

export const endpoints: readonly Endpoint[] = [
  endpoint({
    path: '/cells',
    name: 'listCells',
    summary: 'Cell types with their measured life at the standard use and what their labels imply there',
    example: '/cells?limit=5',
    query: apiCellsQuerySchema,
    response: apiCellsSchema,
    async read(deps, { query }) {
      const { cells, ...rest } = await readCells(deps);
      const sorted = [...cells].sort((a, b) => (a.cellType.id < b.cellType.id ? -1 : 1));
      const later = sorted.filter(({ cellType }) => cellType.id > (query.after ?? ''));
      const page = later.slice(0, query.limit);
      const next = later.length > page.length ? page.at(-1)!.cellType.id : null;
      return {
        body: { ...rest, cells: page, next },
        next: next === null ? undefined : `/cells?after=${encodeURIComponent(next)}&limit=${query.limit}`,
      };
    },
  }),
  endpoint({
    path: '/cells/{cellId}',
    name: 'getCell',
    summary: 'One cell type: life, fade curve, single checks, label and effects; whole or in one band',
    example: '/cells/skerry-240?band=depth:deep',
    params: cellParamsSchema,
    query: cellQuerySchema,
    response: cellPageSchema,
    read: async (deps, { params, query }) => ({ body: await readCellPage(deps, params.cellId, query.band) }),
  }),
  endpoint({
    path: '/fit',
    name: 'getFit',
    summary: 'The public fit in force: parameters, effects and what it is checked by',
    example: '/fit',
    response: publicFitSchema,
    read: async (deps) => ({ body: await readPublicFit(deps) }),
  }),
  endpoint({
    path: '/releases',
    name: 'listReleases',
    summary: 'Releases with their files and checksums, newest first',
    example: '/releases',
    response: releaseListSchema,
    read: async () => ({ body: { releases: (await findReleases()).map(presentRelease) } }),
  }),
  endpoint({
    path: '/checks',
    name: 'listChecks',
    summary: 'Rows of a release, as JSON or, with Accept: text/csv, as CSV; whole banks at a time',
    example: '/checks?limit=2',
    query: apiChecksQuerySchema,
    response: apiChecksSchema,
    async read(_deps, { query }) {
      const page: ChecksPage = await readChecks(query);
      const next = page.body.next;
      return {
        ...page,
        next:
          next === null
            ? undefined
            : `/checks?release=${page.body.release}&after=${next}&limit=${query.limit}`,
      };
    },
  }),
];
