import { Op } from 'sequelize';

import type { Health } from '@/lib/contract/steward';

import { Fit, type FitKind, Job, OutboxMail, TrailCheck, TrailEntry } from '../db/models';
import type { Deps } from '../deps';
import { codeVersion } from '../fits/codeVersion';
import { hidePersonal } from '../moderation/personalText';
import { readProgram } from './readProgram';
import { readLastBackup, readStorage } from './readStorage';
import { screeningFigures } from './screeningFigures';

const mostListed = 50;
const latelyMs = 30 * 86_400_000;
/** A mail that waits longer than this is one that could not be handed over. */
const mailPatienceMs = 600_000;

/** How the exchange stands, all of it, for the steward. */
export async function readHealth(deps: Deps): Promise<Health> {
  const { clock, config, logger } = deps;
  const now = clock();
  const [queue, fits, jobs, mails, storage, lastBackup, trail, program] = await Promise.all([
    screeningFigures(now),
    readFits(deps, now),
    readJobs(),
    readMails(now),
    readStorage(config),
    readLastBackup(config, logger),
    readTrailState(deps),
    readProgram(now),
  ]);
  return { queue, fits, jobs, mails, storage, lastBackup, trail, program };
}

async function readFits({ jobs }: Deps, now: Date): Promise<Health['fits']> {
  const without = { exclude: ['parameters', 'covariance', 'diagnostics', 'curves'] };
  const newestFirst: [string, string][] = [['createdAt', 'DESC']];
  const kinds: FitKind[] = ['working', 'public'];
  const last = await Promise.all(
    kinds.map((kind) => Fit.findOne({ where: { kind }, attributes: without, order: newestFirst })),
  );
  const failed = await Fit.findAll({
    where: { isGood: false, createdAt: { [Op.gte]: new Date(now.getTime() - latelyMs) } },
    attributes: without,
    order: newestFirst,
    limit: mostListed,
  });
  return {
    last: last.flatMap((fit) => (fit ? presentFit(fit) : [])),
    failedLately: failed.map(presentFit),
    isRunning: (await jobs.countPending('refit')) > 0,
  };
}

const presentFit = ({ kind, createdAt, durationMs, isGood, reason, codeVersion: madeBy }: Fit) => ({
  ...{ kind, fittedAt: createdAt.toISOString(), durationMs, isGood, reason },
  isOfThisCode: madeBy === codeVersion,
});

async function readJobs(): Promise<Health['jobs']> {
  const { count, rows } = await Job.findAndCountAll({
    where: { state: 'failed' },
    order: [['updatedAt', 'DESC']],
    limit: mostListed,
  });
  return {
    waiting: await Job.count({ where: { state: ['queued', 'running'] } }),
    failedCount: count,
    failed: rows.map(({ id, kind, attempts, error, updatedAt }) => ({
      ...{ id, kind, attempts, failedAt: updatedAt.toISOString() },
      error: hidePersonal(error ?? ''),
    })),
  };
}

async function readMails(now: Date): Promise<Health['mails']> {
  const longAgo = new Date(now.getTime() - mailPatienceMs);
  const { count, rows } = await OutboxMail.findAndCountAll({
    where: { [Op.or]: [{ state: 'failed' }, { state: 'queued', createdAt: { [Op.lt]: longAgo } }] },
    order: [['createdAt', 'DESC']],
    limit: mostListed,
  });
  return {
    undeliveredCount: count,
    undelivered: rows.flatMap(({ id, subject, state, problem, createdAt }) =>
      state === 'sent'
        ? []
        : {
            ...{ id, subject, state, createdAt: createdAt.toISOString() },
            problem: problem === null ? null : hidePersonal(problem),
          },
    ),
  };
}

async function readTrailState({ jobs }: Deps): Promise<Health['trail']> {
  const [entries, check, pending] = await Promise.all([
    TrailEntry.count(),
    TrailCheck.findOne({ order: [['id', 'DESC']] }),
    jobs.countPending('verifyTrail'),
  ]);
  return {
    entries,
    isChecking: pending > 0,
    lastCheck: check && {
      at: check.checkedAt.toISOString(),
      ...{ entries: check.entries, problems: check.problems, durationMs: check.durationMs },
    },
  };
}
