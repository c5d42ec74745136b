import type { CookieOptions, Request, Response } from 'express';

import type { Config } from '../config';
import { accessCookie, accessMinutes } from '../http/actor';

const refreshCookie = 'ebblineRefresh';
export const refreshDays = 30;

/** Scripts can't read them and other sites can't send them; the refresh token goes to the account routes only. */
const options = ({ hasSecureCookies }: Config, path: string): CookieOptions => ({
  httpOnly: true,
  sameSite: 'strict',
  secure: hasSecureCookies,
  path,
});
const accessOptions = (config: Config) => options(config, '/api');
const refreshOptions = (config: Config) => options(config, '/api/account');

export function setAccessCookie(config: Config, res: Response, token: string): void {
  res.cookie(accessCookie, token, { ...accessOptions(config), maxAge: accessMinutes * 60_000 });
}

export function setRefreshCookie(config: Config, res: Response, token: string): void {
  res.cookie(refreshCookie, token, { ...refreshOptions(config), maxAge: refreshDays * 86_400_000 });
}

export function clearSessionCookies(config: Config, res: Response): void {
  res.clearCookie(accessCookie, accessOptions(config));
  res.clearCookie(refreshCookie, refreshOptions(config));
}

export function refreshTokenOf(req: Request): string | undefined {
  const token: unknown = req.cookies[refreshCookie];
  return typeof token === 'string' ? token : undefined;
}
