import type { RequestHandler } from 'express';
import jwt from 'jsonwebtoken';
import { z } from 'zod';

import { roleSchema } from '@/lib/contract/accounts';

import type { Config } from '../config';
import { User } from '../db/models';
import type { Actor } from '../policies';

declare module 'express-serve-static-core' {
  interface Request {
    actor: Actor;
  }
}

export const accessCookie = 'ebblineAccess';
export const accessMinutes = 15;

const claimsSchema = z.object({ sub: z.string(), role: roleSchema, fam: z.string() });

/** A signed access token, good for fifteen minutes. */
export function signAccessToken(config: Config, actor: Extract<Actor, { userId: string }>): string {
  const claims = { sub: actor.userId, role: actor.role, fam: actor.familyId };
  return jwt.sign(claims, config.secret, { algorithm: 'HS256', expiresIn: `${accessMinutes}m` });
}

/**
 * Sets `req.actor` from the access cookie; a missing, broken or expired one is a visitor, and so is one of an account
 * that has been deleted since it was signed.
 */
export function readActor(config: Config): RequestHandler {
  return async (req, _res, next) => {
    req.actor = await stillThere(actorOf(config, req.cookies?.[accessCookie]));
    next();
  };
}

async function stillThere(actor: Actor): Promise<Actor> {
  if (actor.role === 'visitor') return actor;
  const isThere = (await User.count({ where: { id: actor.userId, erasedAt: null } })) > 0;
  return isThere ? actor : { role: 'visitor' };
}

function actorOf(config: Config, token: unknown): Actor {
  if (typeof token !== 'string') return { role: 'visitor' };
  try {
    const claims = claimsSchema.parse(jwt.verify(token, config.secret, { algorithms: ['HS256'] }));
    return { role: claims.role, userId: claims.sub, familyId: claims.fam };
  } catch {
    return { role: 'visitor' };
  }
}
