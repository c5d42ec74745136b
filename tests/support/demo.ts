import { cpSync, existsSync, mkdtempSync, renameSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';

import { findChromium } from '@/scripts/findChromium';
import { demoAccounts } from '@/server/accounts/demoAccounts';
import { readConfig } from '@/server/config';
import type { Deps } from '@/server/deps';
import { seedDemo } from '@/server/seed/seedDemo';
import { start } from '@/server/start';

const flags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
const startedAt = Date.parse('2026-12-01T12:00:00Z');
const patienceMs = 30_000;

/** How long seeding and the first fit may take on a busy machine: for the hook that starts the demo. */
export const demoStartMs = 300_000;

/** The product with the demo in it, as `npm start` serves it, and a Chromium to look at it with. */
export interface Demo {
  url: string;
  deps: Deps;
  /** A page of a browser of its own: no cookies, nothing stored. What goes wrong in it is kept in `faults`. */
  open: (options?: BrowserContextOptions) => Promise<Page>;
  /** Errors of scripts and of the content policy on any page since the last call. */
  takeFaults: () => string[];
  /** Sets the server's clock on, and does what has become due. */
  pass: (seconds: number) => Promise<void>;
  stop: () => Promise<void>;
}

const configOf = (dataDir: string) =>
  readConfig({
    NODE_ENV: 'test',
    EBBLINE_BCRYPT_COST: '4',
    EBBLINE_DATA_DIR: dataDir,
    EBBLINE_RATE_LIMITS: 'off',
    EBBLINE_LOG_LEVEL: 'warn',
    HOST: '127.0.0.1',
    PORT: '0',
  });

/**
 * A data folder with the demo in it and its first fits done. The first file of a run seeds it; the others copy what
 * that one left, which takes a second in place of most of a minute.
 */
async function seededDataDir(): Promise<string> {
  const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-demo-'));
  const kept = join(process.env.EBBLINE_TEST_RUN_DIR ?? dataDir, 'demo');
  if (existsSync(kept)) {
    cpSync(kept, dataDir, { recursive: true });
    return dataDir;
  }
  const { deps, stop } = await start(configOf(dataDir), { clock: () => new Date(startedAt) });
  await seedDemo(deps);
  await deps.jobs.settle();
  await stop();
  if (process.env.EBBLINE_TEST_RUN_DIR) {
    // Whole or not there: another file may look for it meanwhile.
    const copy = mkdtempSync(`${kept}-`);
    cpSync(dataDir, copy, { recursive: true });
    if (!existsSync(kept)) renameSync(copy, kept);
  }
  return dataDir;
}

/** Serves the built web app with a demo of its own on a free port. */
export async function startDemo(): Promise<Demo> {
  const dataDir = await seededDataDir();
  // The demo's day, running on: the scenario's last checks are days old, whenever this runs.
  let lag = startedAt - Date.now();
  const { url, deps, stop } = await start(configOf(dataDir), { clock: () => new Date(Date.now() + lag) });
  await deps.jobs.settle();
  const browser = await chromium.launch({ executablePath: findChromium(), args: flags });
  const faults: string[] = [];
  return {
    url,
    deps,
    open: (options) => openPage(browser, faults, { baseURL: url, ...options }),
    takeFaults: () => faults.splice(0),
    async pass(seconds) {
      lag += seconds * 1000;
      await deps.jobs.settle();
    },
    async stop() {
      await browser.close();
      await stop();
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

async function openPage(browser: Browser, faults: string[], options: BrowserContextOptions): Promise<Page> {
  const context = await browser.newContext({
    viewport: { width: 1280, height: 900 },
    reducedMotion: 'reduce',
    // Requests that go through a service worker can't be held up by tests; those of it let it run.
    serviceWorkers: 'block',
    ...options,
  });
  context.setDefaultTimeout(patienceMs);
  const page = await context.newPage();
  page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.message}`));
  page.on('console', (message) => {
    const isRefusal = message.text().startsWith('Failed to load resource');
    if (message.type() === 'error' && !isRefusal) faults.push(`${page.url()}: ${message.text()}`);
  });
  return page;
}

/** Signs in through the form, as one of the demo's accounts unless a password is given. */
export async function signInOn(page: Page, email: string, password = demoAccounts[0]!.password) {
  await page.goto('/sign-in');
  await page.getByRole('textbox', { name: 'E-mail address' }).fill(email);
  await page.getByRole('textbox', { name: 'Password' }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL((address) => !address.pathname.startsWith('/sign-in'));
}
