import type { Express } from 'express';
import supertest from 'supertest';

import { OutboxMail } from '@/server/db/models';

/** A browser as the API sees it: keeps cookies by their path and carries the CSRF token of the last session answer. */
export interface Browser {
  get: (path: string) => supertest.Test;
  post: (path: string, body?: object) => Promise<supertest.Response>;
  /** Sends a file of text as a form does. */
  attach: (path: string, content: string, filename: string) => Promise<supertest.Response>;
  /** Value of a cookie for the account routes; undefined when it is not there. */
  cookie: (name: string) => string | undefined;
  setCookie: (name: string, value: string | undefined) => void;
}

const accountPath = { domain: '127.0.0.1', path: '/api/account', secure: false, script: false } as const;

export async function openBrowser(app: Express): Promise<Browser> {
  const agent = supertest.agent(app);
  let csrfToken = (await agent.get('/api/account/session')).body.csrfToken as string;
  const cookie = (name: string) => agent.jar.getCookie(name, accountPath)?.value;
  return {
    get: (path) => agent.get(path),
    async post(path, body = {}) {
      const response = await agent.post(path).set('x-csrf-token', csrfToken).send(body);
      csrfToken = response.body.csrfToken ?? csrfToken;
      return response;
    },
    attach: (path, content, filename) =>
      agent.post(path).set('x-csrf-token', csrfToken).attach('file', Buffer.from(content), filename),
    cookie,
    setCookie(name, value) {
      const path = name === 'ebblineRefresh' ? '/api/account' : '/api';
      const year = value === undefined ? 1970 : 2099;
      const expires = `Expires=Thu, 01 Jan ${year} 00:00:01 GMT`;
      agent.jar.setCookie(`${name}=${value ?? ''}; Path=${path}; ${expires}`, '127.0.0.1', path);
    },
  };
}

/** The newest mail to an address. */
export async function lastMailTo(recipient: string): Promise<OutboxMail | null> {
  return OutboxMail.findOne({ where: { recipient }, order: [['rowid', 'DESC']] });
}

/** The token in the link of the newest mail to an address. */
export async function tokenMailedTo(recipient: string): Promise<string> {
  const mail = await lastMailTo(recipient);
  const token = /token=([\w-]+)/.exec(mail?.text ?? '')?.[1];
  if (!token) throw new Error(`no link was mailed to ${recipient}`);
  return token;
}
