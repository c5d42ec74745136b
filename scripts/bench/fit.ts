/**
 * How long a fit takes, and how much memory: 120 to 100,000 banks (seeded simulation), cold (first in a process) and
 * warm; against R's nlme on the same file where Rscript is present
 * (processor time against processor time, so that a busy machine favours neither); a refit after one new check from a warm start.
 * npm run bench:fit [-- largest]. Bars (plain): 1000 banks under 0.3 s, 100,000 under 20 s and 1 GB, 10 x nlme from
 * 1000 banks, growth at most linear; default: 1200 banks in a cold process under 5 s.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { PoolCheck } from '../../lib/fit/poolCheck';
import { fitPool } from '../../lib/fit/pooled/fitPool';
import type { FitPoolOptions } from '../../lib/fit/pooled/fitTypes';
import { arrangePool } from '../../lib/fit/pooled/table';
import { maximise } from '../../lib/fit/pooled/maximise';
import { defaultPriors } from '../../lib/fit/pooled/priors';
import { table } from '../fit/table';
import { drawTruth, simulatePool } from './simulatePool';

const here = __dirname;
const largestNlme = 5000;
const plain: FitPoolOptions = { exponent: 0.5, isScreening: false, isWithoutInteractions: true };

interface Timing {
  banks: number;
  checks: number;
  iterations: number;
  coldSeconds: number;
  warmSeconds: number;
  /** Processor time of the same, which a busy machine stretches less. */
  warmCpuSeconds: number;
  peakMb: number;
}

const poolOf = (banks: number) => simulatePool({ banks, seed: 77 + banks, truth: drawTruth(7, 0) }).checks;

if (process.argv[2] === '--one') {
  console.log(JSON.stringify(timeOne(Number(process.argv[3]), process.argv[4] === 'default')));
} else {
  compare(Number(process.argv[2] ?? 100_000));
}

function compare(largest: number): void {
  const sizes = [120, 1000, 5000, 20_000, 100_000].filter((banks) => banks <= largest);
  const rows = sizes.map((banks) => {
    const one = inFreshProcess(banks, 'plain');
    const nlme = banks <= largestNlme ? timeNlme(banks) : null;
    return [
      String(one.banks),
      String(one.checks),
      String(one.iterations),
      one.coldSeconds.toFixed(2),
      one.warmSeconds.toFixed(3),
      one.warmCpuSeconds.toFixed(3),
      ((1e6 * one.warmSeconds) / one.checks).toFixed(0),
      one.peakMb.toFixed(0),
      nlme === null ? '-' : typeof nlme === 'string' ? nlme : nlme.toFixed(2),
      typeof nlme === 'number' ? `${(nlme / one.warmCpuSeconds).toFixed(1)} x` : '-',
    ];
  });
  const heads = [
    'banks',
    'checks',
    'iterations',
    'cold, s',
    'warm, s',
    'warm cpu, s',
    'warm, us/check',
    'peak MB',
    'nlme cpu, s',
    'ratio',
  ];
  console.log('Plain: exponent fixed at 0.5, screening off, estimator alone.');
  console.log(table(heads, rows));
  const whole = inFreshProcess(1200, 'default');
  console.log(
    `\nDefault (exponents mixed, screening on, all summaries), 1200 banks, ${whole.checks} checks: ` +
      `${whole.coldSeconds.toFixed(2)} s in a cold process, ${whole.warmSeconds.toFixed(2)} s warm`,
  );
  refitWarm();
}

/** The first fit of a process is cold; the best of twelve more (one beyond 10,000 banks) is warm. */
function timeOne(banks: number, isDefault: boolean): Timing {
  const checks = poolOf(banks);
  let iterations = 0;
  const run = () => {
    const started = performance.now();
    const cpu = process.cpuUsage();
    iterations = isDefault ? runDefault(checks) : runPlain(checks);
    const { user, system } = process.cpuUsage(cpu);
    return { wall: (performance.now() - started) / 1000, cpu: (user + system) / 1e6 };
  };
  const coldSeconds = run().wall;
  const repeats = Array.from({ length: banks > 10_000 ? 1 : 12 }, run);
  const warmSeconds = Math.min(...repeats.map(({ wall }) => wall));
  const warmCpuSeconds = Math.min(...repeats.map(({ cpu }) => cpu));
  const peakMb = process.resourceUsage().maxRSS / 1024;
  return { banks, checks: checks.length, iterations, coldSeconds, warmSeconds, warmCpuSeconds, peakMb };
}

function runPlain(checks: PoolCheck[]): number {
  const result = maximise(arrangePool(checks), { exponent: 0.5, priors: defaultPriors });
  if (!result.ok) throw new Error(result.reason);
  return result.iterations;
}

function runDefault(checks: PoolCheck[]): number {
  const fit = fitPool(checks);
  if (!fit.ok) throw new Error(fit.reason);
  return fit.totalIterations;
}

function inFreshProcess(banks: number, mode: 'plain' | 'default'): Timing {
  const args = ['--import', 'tsx', join(here, 'fit.ts'), '--one', String(banks), mode];
  return JSON.parse(execFileSync(process.execPath, args, { encoding: 'utf8' })) as Timing;
}

/** Seconds of R's nlme on the same pool, `FAILED`, or null without R. */
function timeNlme(banks: number): number | string | null {
  const folder = mkdtempSync(join(tmpdir(), 'bench-fit-'));
  try {
    const file = join(folder, 'pool.csv');
    writeFileSync(file, toCsv(poolOf(banks)));
    const run = spawnSync('Rscript', [join(here, 'nlmePool.R'), file], { encoding: 'utf8' });
    if (run.error || run.status !== 0) return null;
    const text = run.stdout.trim();
    return Number.isFinite(Number(text)) ? Number(text) : text;
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function toCsv(checks: PoolCheck[]): string {
  const head = 'bank,model,clamped,depth,c_rate,temp_c,soc_mean,years,efc,rated_ah,capacity_ah,rel_sd';
  const lines = checks.map((check) =>
    [
      ...[check.bank, check.cellType, check.isClamped ? 1 : 0, check.depthFraction, check.dischargeIt],
      ...[check.temperatureC, check.socMeanFraction, check.ageYears, check.efc],
      ...[check.ratedAh, check.capacityAh, check.relSd],
    ].join(','),
  );
  return [head, ...lines].join('\n');
}

/** A pool with one check more, from scratch and from the fit before it. */
function refitWarm(): void {
  const checks = poolOf(1000);
  const before = fitPool(checks.slice(0, -1), plain);
  const cold = fitPool(checks, plain);
  if (!before.ok || !cold.ok) throw new Error('the pools of the warm start did not converge');
  const warm = fitPool(checks, { ...plain, warmStart: before });
  if (!warm.ok) throw new Error(warm.reason);
  console.log(
    `One check more, 1000 banks: ${cold.iterations} iterations cold, ${warm.iterations} from the fit before it`,
  );
}
