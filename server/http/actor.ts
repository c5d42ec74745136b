import type { RequestHandler } from 'express';
import jwt from 'jsonwebtoken';
import { QueryTypes, type Sequelize } from 'sequelize';
import { z } from 'zod';

import { type Role, roleSchema } from '@/lib/contract/accounts';

import type { Config } from '../config';
import type { Deps } from '../deps';
import type { Actor, SignedInActor } from '../policies';
import { isSecondFactorDue } from '../secondFactor/secondFactorOf';

declare module 'express-serve-static-core' {
  interface Request {
    actor: Actor;
    /** Of an access token that came with the request and is good for nothing any more; for CSRF alone. */
    endedFamilyId?: string;
  }
}

export const accessCookie = 'ebblineAccess';
export const accessMinutes = 15;

const claimsSchema = z.object({ sub: z.string(), role: roleSchema, fam: z.string() });

/** A signed access token, good for fifteen minutes. */
export function signAccessToken(config: Config, actor: SignedInActor): string {
  const claims = { sub: actor.userId, role: actor.role, fam: actor.familyId };
  return jwt.sign(claims, config.secret, { algorithm: 'HS256', expiresIn: `${accessMinutes}m` });
}

/**
 * Sets `req.actor` from the access cookie; a missing, broken or expired one is a visitor. So is one whose sign-in has
 * been ended since it was signed, or whose account has been locked or deleted, and the role is the one the account has
 * now: what a steward does to an account holds at once.
 */
export function readActor({ config, db }: Pick<Deps, 'config' | 'db'>): RequestHandler {
  return async (req, _res, next) => {
    const claimed = actorOf(config, req.cookies?.[accessCookie]);
    req.actor = claimed.role === 'visitor' ? claimed : await asItStands(config, db, claimed);
    if (claimed.role !== 'visitor' && req.actor.role === 'visitor') req.endedFamilyId = claimed.familyId;
    next();
  };
}

interface Standing {
  role: Role;
  isLocked: 0 | 1;
  hasFactor: 0 | 1;
  isEnded: 0 | 1;
}

/** Three look-ups by index in one statement. */
const standingSql = `
  SELECT role, lockedAt IS NOT NULL AS isLocked,
    EXISTS (SELECT 1 FROM secondFactors WHERE userId = :userId AND confirmedAt IS NOT NULL) AS hasFactor,
    EXISTS (SELECT 1 FROM sessions WHERE familyId = :familyId AND revokedAt IS NOT NULL) AS isEnded
  FROM users WHERE id = :userId AND erasedAt IS NULL`;

async function asItStands(
  config: Config,
  db: Sequelize,
  { userId, familyId }: SignedInActor,
): Promise<Actor> {
  const [standing] = await db.query<Standing>(standingSql, {
    replacements: { userId, familyId },
    type: QueryTypes.SELECT,
  });
  if (!standing || standing.isLocked || standing.isEnded) return { role: 'visitor' };
  const { role, hasFactor } = standing;
  const due = isSecondFactorDue(config, role, hasFactor === 1);
  return { role, userId, familyId, ...(due ? { isSecondFactorDue: true } : {}) };
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
