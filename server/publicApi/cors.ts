import type { RequestHandler } from 'express';

const exposed = 'ETag, Link, RateLimit, RateLimit-Policy, Retry-After';

/** Lets pages of any origin read, and nothing else: no cookies, no other methods. */
export const readCors: RequestHandler = (req, res, next) => {
  res.set({ 'Access-Control-Allow-Origin': '*', 'Access-Control-Expose-Headers': exposed });
  if (req.method !== 'OPTIONS') return next();
  res.set({
    'Access-Control-Allow-Methods': 'GET, HEAD',
    'Access-Control-Allow-Headers': 'Accept, If-None-Match',
    'Access-Control-Max-Age': '86400',
  });
  res.status(204).end();
};
