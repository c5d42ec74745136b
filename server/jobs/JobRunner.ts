import type { Logger } from 'pino';
import type { Sequelize, Transaction } from 'sequelize';

import { Job } from '../db/models';
import { type JobHandler, Lane } from './Lane';

export type { JobHandler } from './Lane';

interface JobRequest {
  kind: string;
  payload?: Record<string, unknown>;
  /** Queued jobs of one key are one job: a burst asks once. */
  dedupeKey?: string;
  runAfter?: Date;
}

/** How often the table is looked at without being woken, for jobs due later. */
const pollMs = 2_000;

/**
 * The jobs table and its worker loops, one for each kind of job, so that a mail does not wait for a refit. A job is
 * enqueued in the transaction that causes it and so survives a kill; one that was running when the process died is run
 * again, so handlers must stand a second run.
 */
export class JobRunner {
  private readonly lanes = new Map<string, Lane>();
  private timer: NodeJS.Timeout | undefined;

  constructor(
    private readonly db: Sequelize,
    private readonly logger: Logger,
    private readonly clock: () => Date,
  ) {}

  handle(kind: string, handler: JobHandler): void {
    this.lanes.set(kind, new Lane(kind, handler, { db: this.db, logger: this.logger, clock: this.clock }));
  }

  async enqueue(request: JobRequest, transaction: Transaction): Promise<void> {
    const { kind, payload = {}, dedupeKey = null, runAfter = this.clock() } = request;
    await Job.bulkCreate([{ kind, payload, dedupeKey, state: 'queued', runAfter }], {
      transaction,
      ignoreDuplicates: true,
    });
    transaction.afterCommit(() => this.lanes.get(kind)?.wake());
  }

  async start(): Promise<void> {
    await this.requeueInterrupted();
    this.timer = setInterval(() => this.wake(), pollMs);
    this.wake();
  }

  /** Looks at the table now. */
  wake(): void {
    for (const lane of this.lanes.values()) lane.wake();
  }

  /** Ends after the jobs in hand. */
  async stop(): Promise<void> {
    clearInterval(this.timer);
    await Promise.all([...this.lanes.values()].map((lane) => lane.stop()));
  }

  /** Resolves when nothing is due any more, what the jobs themselves enqueued included; for tests and scripts. */
  async settle(): Promise<void> {
    this.wake();
    const lanes = [...this.lanes.values()];
    while (lanes.some(({ isBusy }) => isBusy)) await Promise.all(lanes.map((lane) => lane.idle()));
  }

  /** Jobs of a kind that are queued or running. */
  async countPending(kind: string): Promise<number> {
    return Job.count({ where: { kind, state: ['queued', 'running'] } });
  }

  private async requeueInterrupted(): Promise<void> {
    await this.db.transaction(async (transaction) => {
      const interrupted = await Job.findAll({ where: { state: 'running' }, transaction });
      for (const job of interrupted) {
        const twin = job.dedupeKey
          ? await Job.count({ where: { state: 'queued', dedupeKey: job.dedupeKey }, transaction })
          : 0;
        await job.update({ state: twin ? 'done' : 'queued' }, { transaction });
      }
    });
  }
}
