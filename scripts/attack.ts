/**
 * Plays a curious visitor over everything public, on the demo's pool and on random pools with small groups planted, and
 * prints what was isolated: with all protections on none may be, with each of them off at least one must be found.
 * npm run -s attack -- [pools]
 */
import { generateDemo } from '@/data/demo/generateDemo';
import { type Protections, protections } from '@/server/publicView/protections';
import { demoMembers } from '@/server/seed/demoPool';

import { findIsolations, type Isolation } from './attack/isolations';
import { publish } from './attack/publish';
import { type PoolHistory, randomPool } from './attack/randomPool';
import { switchedOff } from './attack/switchedOff';

const pools = Number(process.argv[2] ?? 50);
const few = Math.min(pools, 5);

const demo = demoHistory();
let isSound = true;
report('demo, all protections on', attack([demo], protections), false);
const random = Array.from({ length: pools }, (_, i) => randomPool(i + 1));
report(`${pools} random pools, all protections on`, attack(random, protections), false);
for (const [name, off] of Object.entries(switchedOff))
  report(`${few} random pools without: ${name}`, attack(random.slice(0, few), off), true);
process.exitCode = isSound ? 0 : 1;

function attack(histories: readonly PoolHistory[], by: Protections): Isolation[] {
  return histories.flatMap((history) => {
    const { shown, moderatorNames } = publish(history, by);
    return findIsolations(shown, moderatorNames);
  });
}

function report(title: string, found: readonly Isolation[], isWanted: boolean): void {
  const kinds = [...new Set(found.map(({ attack: kind }) => kind))].join(', ');
  const isRight = found.length > 0 === isWanted;
  isSound &&= isRight;
  console.log(
    `${isRight ? 'as it must be' : 'NOT AS IT MUST BE'}  ${String(found.length).padStart(5)} isolations  ${title}${kinds && ` (${kinds})`}`,
  );
  if (!isRight) for (const { attack: kind, what } of found.slice(0, 10)) console.log(`    ${kind}: ${what}`);
}

/** The demo without its last checks, with them, and without some owners. */
function demoHistory(): PoolHistory {
  const all = demoMembers(generateDemo().banks);
  const isLate = (checkId: string) => parseInt(checkId.slice(-2), 16) % 10 === 0;
  const isGone = (owner: string) => parseInt(owner.slice(-2), 16) % 50 === 0;
  return [all.filter(({ checkId }) => !isLate(checkId)), all, all.filter(({ row }) => !isGone(row.owner))];
}
