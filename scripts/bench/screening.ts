// Does the screening find gross mistakes and leave honest checks alone? Simulated worlds of about 1,200 banks each with
// mistakes in 2 % of the checks, seeded, the truth known: npm run bench:screening [worlds]. Bars: at least 95 % of the
// mistakes caught, at most 5 % of the honest checks flagged. Caught and flagged both mean: a finding that is doubtful or
// repairable. Remarks worth a look, and logs that were copied, stand in tables of their own.
import { table } from '../fit/table';
import { screenCopies } from './screening/copies';
import { mistakes } from './screening/mistakes';
import { type Screened, screenWorld } from './screening/world';

const worlds = Number(process.argv[2] ?? 10);
const firstSeed = 31_000;

const screened: Screened[] = [];
for (let world = 0; world < worlds; world += 1) screened.push(...screenWorld(firstSeed + world));

const percent = (part: number, whole: number) =>
  whole === 0 ? '-' : `${((100 * part) / whole).toFixed(2)} %`;
const rulesBehind = (ones: readonly Screened[]) => {
  const counts = new Map<string, number>();
  for (const { findings } of ones) {
    const worst = findings.filter(({ severity }) => severity === 'doubtful' || severity === 'repairable');
    for (const { rule } of worst) counts.set(rule, (counts.get(rule) ?? 0) + 1);
  }
  const names = [...counts].sort((a, b) => b[1] - a[1]).map(([rule, count]) => `${rule} ${count}`);
  return names.slice(0, 3).join(', ');
};

const planted = screened.filter(({ kind }) => kind !== null);
const honest = screened.filter(({ kind }) => kind === null);
const row = (name: string, ones: readonly Screened[]) => {
  const caught = ones.filter(({ isFlagged }) => isFlagged);
  return [
    name,
    String(ones.length),
    String(caught.length),
    percent(caught.length, ones.length),
    rulesBehind(ones),
  ];
};
const head = ['mistake', 'planted', 'caught', 'share', 'rules that say so most'];
console.log(
  table(head, [
    ...Object.keys(mistakes).map((kind) =>
      row(
        kind,
        planted.filter((one) => one.kind === kind),
      ),
    ),
    row('all gross mistakes', planted),
    row('honest checks', honest),
  ]),
);

const looks = new Map<string, number>();
for (const { findings } of honest)
  for (const { rule, severity } of findings)
    if (severity === 'look') looks.set(rule, (looks.get(rule) ?? 0) + 1);
const looked = honest.filter(({ findings }) => findings.some(({ severity }) => severity === 'look')).length;
console.log(`\nhonest checks with a remark worth a look: ${percent(looked, honest.length)}`);
console.log(
  table(
    ['remark', 'honest checks', 'share'],
    [...looks].sort((a, b) => b[1] - a[1]).map(([rule, n]) => [rule, String(n), percent(n, honest.length)]),
  ),
);

console.log(`\nlogs that stand in the exchange already, under other bytes`);
console.log(
  table(
    ['log', 'tried', 'doubtful', 'worth a look', 'new'],
    screenCopies(firstSeed).map(({ name, tried, doubtful, look }) => [
      ...[name, String(tried), percent(doubtful, tried), percent(look, tried)],
      percent(tried - doubtful - look, tried),
    ]),
  ),
);

const caughtShare = planted.filter(({ isFlagged }) => isFlagged).length / planted.length;
const flaggedShare = honest.filter(({ isFlagged }) => isFlagged).length / honest.length;
const isMet = caughtShare >= 0.95 && flaggedShare <= 0.05;
console.log(
  `\ncaught ${percent(caughtShare, 1)} of ${planted.length} (bar 95 %), flagged ${percent(flaggedShare, 1)} of ${honest.length} honest checks (bar 5 %): ${isMet ? 'met' : 'NOT MET'}`,
);
if (!isMet) process.exitCode = 1;
