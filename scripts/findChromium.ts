import { accessSync, constants } from 'node:fs';

const usualPlaces = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/snap/bin/chromium',
];

/** Path of a Chromium: CHROMIUM_PATH, then the usual places. Throws saying what to install. */
export function findChromium(): string {
  const candidates = [process.env.CHROMIUM_PATH ?? [], usualPlaces].flat();
  const found = candidates.find(canRun);
  if (!found)
    throw new Error(
      'The browser tests need Chromium: apt-get install chromium, or set CHROMIUM_PATH to one.',
    );
  return found;
}

function canRun(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}
