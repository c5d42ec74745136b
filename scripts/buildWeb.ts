import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { brotliCompressSync, constants, gzipSync } from 'node:zlib';

import { writeServiceWorker } from './serviceWorker';

const output = 'dist/web';
const hashFile = 'source-hash.txt';
const sources = [
  'app',
  'components',
  'lib',
  'public',
  'app.json',
  'babel.config.js',
  'metro.config.js',
  'package-lock.json',
  'scripts/serviceWorker.ts',
];
const compressible = /\.(js|css|html|json|svg|txt|map|ttf|webmanifest)$/;

/**
 * Exports the web app when its sources changed since the last export, writes its service worker and compresses what the
 * server will send.
 */
export async function buildWeb(): Promise<void> {
  const hash = hashOf(sources);
  const stamp = join(output, hashFile);
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return;
  console.log('Building the web app; the first time takes a minute or two.');
  const next = `${output}.next`;
  rmSync(next, { recursive: true, force: true });
  const { status, stdout, stderr } = spawnSync('npx', ['expo', 'export', '-p', 'web', '--output-dir', next], {
    encoding: 'utf8',
    env: { ...process.env, NODE_ENV: 'production', CI: '1', EXPO_NO_TELEMETRY: '1', EXPO_OFFLINE: '1' },
  });
  if (status !== 0) throw new Error(`The web app could not be built:\n${stdout}\n${stderr}`);
  await writeServiceWorker(next);
  for (const file of filesBelow(next)) if (compressible.test(file)) compress(file);
  writeFileSync(join(next, hashFile), hash);
  rmSync(output, { recursive: true, force: true });
  renameSync(next, output);
}

function compress(file: string): void {
  const content = readFileSync(file);
  const quality = { [constants.BROTLI_PARAM_QUALITY]: constants.BROTLI_MAX_QUALITY };
  writeFileSync(`${file}.br`, brotliCompressSync(content, { params: quality }));
  writeFileSync(`${file}.gz`, gzipSync(content, { level: 9 }));
}

function hashOf(paths: string[]): string {
  const hash = createHash('sha256');
  for (const path of paths.filter((path) => existsSync(path)))
    for (const file of filesBelow(path)) hash.update(file).update(readFileSync(file));
  return hash.digest('hex');
}

function filesBelow(path: string): string[] {
  if (statSync(path).isFile()) return [path];
  return readdirSync(path, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

if (require.main === module)
  buildWeb().catch((error: unknown) => {
    console.error(error);
    process.exitCode = 1;
  });
