import type { Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';

import type { Deps } from '../deps';
import { AppError, invalidInput } from '../errors';
import { type Action, type Actor, authorize } from '../policies';
import { keptAnswer, sendKept } from './keptAnswers';

export type LimitName = 'signIn' | 'reset' | 'submission' | 'upload' | 'sharedLink' | 'publicApi';

type Parsed<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined;

export interface RouteInput<Params, Query, Body> {
  params: Parsed<Params>;
  query: Parsed<Query>;
  body: Parsed<Body>;
  actor: Actor;
  deps: Deps;
  req: Request;
  res: Response;
}

/** One route: its policy, its schemas, and a handler that returns what the response schema lets through. */
export interface Route {
  method: 'get' | 'post' | 'put' | 'delete';
  path: string;
  policy: Action;
  limit: LimitName | undefined;
  /** What lets it in is a signed token it is sent, from anywhere: no CSRF token is asked for. */
  isTokenBound: boolean;
  /** Middleware of this route alone, such as a file receiver; runs after authorization. */
  before: ((deps: Deps) => RequestHandler) | undefined;
  run: (deps: Deps, req: Request, res: Response) => Promise<void>;
}

interface InputSpec<Params, Query, Body> {
  method: Route['method'];
  path: string;
  policy: Action;
  limit?: LimitName;
  isTokenBound?: boolean;
  params?: Params;
  query?: Query;
  body?: Body;
  before?: (deps: Deps) => RequestHandler;
}

interface RouteSpec<Params, Query, Body, Answer extends z.ZodType> extends InputSpec<Params, Query, Body> {
  response: Answer;
  status?: number;
  /** The same for everyone: kept until anything it is made of changes, and sent with a tag. */
  isKept?: boolean;
  handle: (input: RouteInput<Params, Query, Body>) => Promise<z.input<Answer>>;
}

/** What is not JSON: a file to keep, a picture to look at, or another place to go to. */
export type RawAnswer =
  | { type: string; filename: string; content: string }
  | { type: string; filename: string; inline: Buffer }
  | { redirect: string }
  /** Sends by itself, as a stream does. */
  | { send: (exchange: { req: Request; res: Response }) => Promise<void> };

interface RawRouteSpec<Params, Query, Body> extends InputSpec<Params, Query, Body> {
  handle: (input: RouteInput<Params, Query, Body>) => Promise<RawAnswer>;
}

/**
 * Binds a spec: authorize by role, parse params, query and body, handle, and send only what the response schema
 * lists. Record-level permission is the handler's, through authorizeRecord.
 */
export function route<
  Answer extends z.ZodType,
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(spec: RouteSpec<Params, Query, Body, Answer>): Route {
  return bind(spec, async (input) => {
    const { req, res, deps, params, query } = input;
    const made = async () => spec.response.parse(await spec.handle(input));
    if (!spec.isKept) {
      res.status(spec.status ?? 200).json(await made());
      return;
    }
    const key = JSON.stringify([spec.path, params ?? null, query ?? null]);
    const answer = await keptAnswer(deps.db, key, async () => ({
      type: 'application/json',
      content: JSON.stringify(await made()),
    }));
    sendKept(req, res, answer);
  });
}

/** The same for a route that answers with a file or a redirection. */
export function rawRoute<
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(spec: RawRouteSpec<Params, Query, Body>): Route {
  return bind(spec, async (input) => {
    const answer = await spec.handle(input);
    if ('send' in answer) return answer.send(input);
    if ('redirect' in answer) return input.res.redirect(303, answer.redirect);
    if ('inline' in answer) return sendPrivate(input.res, answer);
    input.res.attachment(answer.filename).type(answer.type).send(answer.content);
  });
}

/**
 * To be shown in its reader's own pages. A browser may keep it, but asks again each time, so that nobody sees it after
 * its reader signed out.
 */
function sendPrivate(
  res: Response,
  { type, filename, inline }: Extract<RawAnswer, { inline: Buffer }>,
): void {
  res.setHeader('Cache-Control', 'private, no-cache');
  res.setHeader('Content-Disposition', `inline; filename="${filename}"`);
  res.type(type).send(inline);
}

function bind<
  Params extends z.ZodType | undefined,
  Query extends z.ZodType | undefined,
  Body extends z.ZodType | undefined,
>(
  spec: InputSpec<Params, Query, Body>,
  answer: (input: RouteInput<Params, Query, Body>) => Promise<void>,
): Route {
  return {
    method: spec.method,
    path: spec.path,
    policy: spec.policy,
    limit: spec.limit,
    isTokenBound: spec.isTokenBound ?? false,
    before: spec.before,
    async run(deps, req, res) {
      const input = {
        params: parseParams(spec.params, req.params),
        query: parse(spec.query, req.query),
        body: parse(spec.body, req.body),
        actor: req.actor,
        deps,
        req,
        res,
      };
      await answer(input as RouteInput<Params, Query, Body>);
    },
  };
}

/** Runs before anything of the route is read, so that refusals do not depend on the input. */
export function authorizeRoute({ policy }: Route): RequestHandler {
  return (req, _res, next) => {
    authorize(req.actor, policy);
    next();
  };
}

function parse(schema: z.ZodType | undefined, value: unknown): unknown {
  if (!schema) return undefined;
  const parsed = schema.safeParse(value ?? {});
  if (!parsed.success) throw invalidInput(parsed.error);
  return parsed.data;
}

/** An address with an impossible id is an address of nothing. */
function parseParams(schema: z.ZodType | undefined, value: unknown): unknown {
  if (!schema) return undefined;
  const parsed = schema.safeParse(value);
  if (!parsed.success) throw new AppError('notFound');
  return parsed.data;
}
