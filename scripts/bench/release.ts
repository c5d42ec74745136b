/**
 * How long a release of 100,000 checks takes, and how much memory: banks with three checks each, of 20 cell types, from
 * the public pool in the database to the files in the storage. Bars: 60 s, 500 MB.
 * npm run -s bench:release -- [checks]
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { pino } from 'pino';

import { readConfig } from '@/server/config';
import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import { PoolStep, Release } from '@/server/db/models';
import type { Deps } from '@/server/deps';
import { JobRunner } from '@/server/jobs/JobRunner';
import type { BankIdentity } from '@/server/publicView/identity';
import { createMakeRelease } from '@/server/releases/makeRelease';
import { createStorage } from '@/server/uploads/createStorage';

import { createDice } from './dice';

const checks = Number(process.argv[2] ?? 100_000);
const perBank = 3;
const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-release-'));
const config = readConfig({ NODE_ENV: 'test', EBBLINE_DATA_DIR: dataDir });
void run();

async function run(): Promise<void> {
  const db = await connect(config.databaseFile);
  await migrate(db);
  const logger = pino({ level: 'silent' });
  const clock = () => new Date();
  const deps: Deps = {
    ...{ config, db, logger, clock, storage: createStorage(config) },
    jobs: new JobRunner(db, logger, clock),
  };
  await fillPool(db);
  const { handler, close } = createMakeRelease(deps);
  let peak = 0;
  const watch = setInterval(() => (peak = Math.max(peak, process.memoryUsage().rss)), 50);
  const startedAt = performance.now();
  await handler({ note: 'A bench.', userId: 'nobody' });
  const seconds = (performance.now() - startedAt) / 1000;
  clearInterval(watch);
  const release = await Release.findOne({ rejectOnEmpty: true });
  console.log(
    `${release.checks} checks on ${release.banks} banks: ${seconds.toFixed(1)} s, ${(peak / 1e6).toFixed(0)} MB at most`,
  );
  await close();
  deps.storage.close();
  await db.close();
  rmSync(dataDir, { recursive: true, force: true });
}

async function fillPool(db: Deps['db']): Promise<void> {
  const dice = createDice(1);
  await db.query('PRAGMA foreign_keys = OFF');
  const { id: stepId } = await PoolStep.create({ owners: 5, added: checks, removed: 0 });
  let values: string[] = [];
  const flush = async () => {
    if (values.length > 0)
      await db.query(
        `INSERT INTO publicMembers (checkId, stepId, row, identity, level) VALUES ${values.join(',')}`,
      );
    values = [];
  };
  for (let bank = 0; bank < checks / perBank; bank += 1) {
    const cellType = `cell-${Math.floor(dice.uniform() * 20)}`;
    const identity: BankIdentity = {
      ...{ cellType, commissionedYear: 2016 + Math.floor(dice.uniform() * 8), climateBand: 'mild' },
      layoutClass: dice.uniform() < 0.5 ? '16s single' : '8s parallel',
      clamping: dice.uniform() < 0.4 ? 'rigid' : 'none',
    };
    const [perYear, depth, heat, rate] = [
      120 + 160 * dice.uniform(),
      0.2 + 0.7 * dice.uniform(),
      15 + 18 * dice.uniform(),
      0.05 + 0.4 * dice.uniform(),
    ];
    for (let check = 1; check <= perBank; check += 1) {
      const ageYears = check * 1.5 + dice.uniform();
      const efc = perYear * ageYears;
      const row = {
        ...{
          bank: `bank-${bank}`,
          owner: `owner-${bank % 25_000}`,
          cellType,
          isClamped: identity.clamping !== 'none',
        },
        ...{
          depthFraction: depth,
          dischargeIt: rate,
          temperatureC: heat,
          socMeanFraction: 0.4 + 0.2 * dice.uniform(),
        },
        ...{
          ageYears,
          efc,
          ratedAh: 100,
          capacityAh: 102 - 6 * (efc / 500) ** 0.7 + dice.normal(),
          relSd: 0.01,
        },
      };
      values.push(
        `('${bank}-${check}', ${stepId}, '${JSON.stringify(row)}', '${JSON.stringify(identity)}', 5)`,
      );
    }
    if (values.length >= 500) await flush();
  }
  await flush();
}
