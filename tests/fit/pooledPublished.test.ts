import { readFileSync } from 'node:fs';
import { dirname, resolve } from 'node:path';

const face = resolve(__dirname, '../../lib/fit/pooled/published.ts');

/** Every module a file brings with it (types aside), ours by path, packages by name. */
function brings(file: string, seen = new Set<string>()): Set<string> {
  if (seen.has(file)) return seen;
  seen.add(file);
  const imports = readFileSync(file, 'utf8').matchAll(
    /^(?:import|export)\s+(?!type )[^;]*?from '([^']+)'/gms,
  );
  for (const [, from = ''] of imports) {
    if (from.startsWith('.')) brings(resolve(dirname(file), `${from}.ts`), seen);
    else seen.add(from);
  }
  return seen;
}

describe('the part of the fit that pages load', () => {
  it('brings no package and no estimator', () => {
    const brought = [...brings(face)];
    expect(brought.filter((name) => !name.startsWith('/'))).toEqual([]);
    expect(brought.filter((name) => /maximise|evaluate|accumulate|fitPool/.test(name))).toEqual([]);
    // The walk itself works: lives need the fade curve.
    expect(brought.some((name) => name.endsWith('pooled/fade.ts'))).toBe(true);
  });
});
