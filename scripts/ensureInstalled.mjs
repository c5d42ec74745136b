// Runs before anything is installed, so it uses Node alone: installs when node_modules is missing or older than the lock.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';

const stampFile = 'node_modules/.installed-lock';
const wanted = createHash('sha256')
  .update(readFileSync('package-lock.json'))
  .update(process.version)
  .digest('hex');

if (!existsSync(stampFile) || readFileSync(stampFile, 'utf8') !== wanted) {
  console.log('Installing packages; SQLite is compiled, which takes a few minutes the first time.');
  const { status } = spawnSync('npm', ['ci', '--no-fund', '--no-audit'], { stdio: 'inherit', shell: true });
  if (status !== 0) {
    console.error('The install failed. Node 20.19 or newer, npm, python3, make and g++ are needed.');
    process.exit(status ?? 1);
  }
  writeFileSync(stampFile, wanted);
}
