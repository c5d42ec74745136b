/**
 * Prints the demo's pool as CSV, in the columns the command-line fit reads:
 * node --import tsx scripts/exportDemoPool.ts > demo-pool.csv && npm run -s fit -- demo-pool.csv
 */
import { generateDemo } from '@/data/demo/generateDemo';
import type { PoolCheck } from '@/lib/fit';
import { demoPool } from '@/server/seed/demoPool';

const columns: readonly [name: string, value: (check: PoolCheck) => string | number][] = [
  ['bank', ({ bank }) => bank],
  ['owner', ({ owner }) => owner],
  ['cell_type', ({ cellType }) => cellType],
  ['clamped', ({ isClamped }) => (isClamped ? 1 : 0)],
  ['depth', ({ depthFraction }) => depthFraction.toFixed(4)],
  ['c_rate', ({ dischargeIt }) => dischargeIt.toFixed(4)],
  ['temp_c', ({ temperatureC }) => temperatureC.toFixed(2)],
  ['soc_mean', ({ socMeanFraction }) => socMeanFraction.toFixed(4)],
  ['years', ({ ageYears }) => ageYears.toFixed(3)],
  ['efc', ({ efc }) => efc.toFixed(1)],
  ['rated_ah', ({ ratedAh }) => ratedAh],
  ['capacity_ah', ({ capacityAh }) => capacityAh.toFixed(2)],
  ['rel_sd', ({ relSd }) => relSd.toFixed(5)],
  ['temp_source', ({ temperatureSource }) => temperatureSource ?? ''],
  ['soc_source', ({ socSource }) => socSource ?? ''],
  ['clamping_unclear', ({ isClampingUnclear }) => (isClampingUnclear ? 1 : 0)],
];

const lines = demoPool(generateDemo().banks).map((check) =>
  columns.map(([, value]) => value(check)).join(','),
);
console.log([columns.map(([name]) => name).join(','), ...lines].join('\n'));
