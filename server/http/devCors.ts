import type { RequestHandler } from 'express';

/** While developing Metro serves the app from its own port; that one origin may call the API with cookies. */
export function devCors(origin: string): RequestHandler {
  return (req, res, next) => {
    if (req.headers.origin !== origin) return next();
    res.setHeader('Access-Control-Allow-Origin', origin);
    res.setHeader('Access-Control-Allow-Credentials', 'true');
    res.setHeader('Access-Control-Allow-Headers', 'content-type, x-csrf-token');
    res.setHeader('Access-Control-Allow-Methods', 'GET, POST, PUT, DELETE');
    res.setHeader('Vary', 'Origin');
    if (req.method === 'OPTIONS') return void res.sendStatus(204);
    next();
  };
}
