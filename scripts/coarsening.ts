/**
 * What coarsening costs: the demo's pool fitted as measured and as published, beside each other.
 * npm run -s coarsening
 */
import { generateDemo } from '@/data/demo/generateDemo';
import { fitPool, type PooledFit } from '@/lib/fit';
import { planStep, publicBanks } from '@/server/pool/planStep';
import type { PublicPoolMember } from '@/server/pool/poolRow';
import { inCanonicalOrder } from '@/server/publicView/canonicalOrder';
import { classOf, groupBy } from '@/server/publicView/bankRows';
import { levelNames } from '@/server/publicView/identity';
import { protections } from '@/server/publicView/protections';
import { demoMembers } from '@/server/seed/demoPool';

const members = demoMembers(generateDemo().banks);
let published: PublicPoolMember[] = [];
for (let plan = planStep(members, published); plan; plan = planStep(members, published)) {
  const gone = new Set([...plan.remove, ...plan.put.map(({ checkId }) => checkId)]);
  published = [...published.filter(({ checkId }) => !gone.has(checkId)), ...plan.put];
}
const banks = publicBanks(published);
const all = new Set(members.map(({ row }) => row.bank)).size;
console.log(`${members.length} checks on ${all} banks; published ${published.length} on ${banks.length}`);
levelNames.forEach((name, level) => {
  const own = banks.filter((bank) => bank.level === level);
  const classes = groupBy(own, classOf).size;
  console.log(`  ${name.padEnd(24)} ${String(own.length).padStart(5)} banks in ${classes} classes`);
});

const measured = fitted(members.map(({ row }) => row));
const coarse = fitted(
  inCanonicalOrder(banks, protections).flatMap(({ checks }) => checks.map(({ row }) => row)),
);
console.log('\nparameter    as measured           as published          shift in standard errors');
measured.parameters.forEach(({ name, estimate, se }, i) => {
  const other = coarse.parameters[i]!;
  console.log(
    `${name.padEnd(8)} ${figure(estimate)} ± ${figure(se)} ${figure(other.estimate)} ± ${figure(other.se)} ${figure((other.estimate - estimate) / se)}`,
  );
});
console.log('\nscenario              years to 80 % as measured and as published (90 % range)');
measured.lifetimes.forEach(({ scenario, years }, i) => {
  const other = coarse.lifetimes[i]!.years;
  const range = ({ estimate, lower, upper }: typeof years) =>
    `${figure(estimate)} (${figure(lower)} to ${figure(upper)})`;
  console.log(`${scenario.padEnd(18)} ${range(years)}   ${range(other)}`);
});

function fitted(rows: Parameters<typeof fitPool>[0]): PooledFit {
  const fit = fitPool(rows);
  if (!fit.ok) throw new Error(fit.reason);
  return fit;
}

function figure(value: number): string {
  return value.toPrecision(3).padStart(9);
}
