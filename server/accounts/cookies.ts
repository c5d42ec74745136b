import type { CookieOptions, Request, Response } from 'express';

import type { Config } from '../config';
import { stepMinutes } from '../secondFactor/stepToken';
import { accessCookie, accessMinutes } from '../http/actor';

const refreshCookie = 'ebblineRefresh';
/** Between the password and the code. */
const stepCookie = 'ebblineStep';
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

export function setStepCookie(config: Config, res: Response, token: string): void {
  res.cookie(stepCookie, token, { ...refreshOptions(config), maxAge: stepMinutes * 60_000 });
}

export function clearStepCookie(config: Config, res: Response): void {
  res.clearCookie(stepCookie, refreshOptions(config));
}

export function clearSessionCookies(config: Config, res: Response): void {
  res.clearCookie(accessCookie, accessOptions(config));
  res.clearCookie(refreshCookie, refreshOptions(config));
}

export const refreshTokenOf = (req: Request) => textOf(req.cookies[refreshCookie]);

export const stepTokenOf = (req: Request) => textOf(req.cookies[stepCookie]);

function textOf(token: unknown): string | undefined {
  return typeof token === 'string' ? token : undefined;
}
