import type { Logger } from 'pino';
import { Op, type Sequelize } from 'sequelize';

import { Job } from '../db/models';

export type JobHandler = (payload: Record<string, unknown>) => Promise<void>;

export interface LaneContext {
  db: Sequelize;
  logger: Logger;
  clock: () => Date;
}

const maxAttempts = 5;
const firstDelayMs = 1_000;

/** The jobs of one kind, done one after the other; kinds do not wait for each other. */
export class Lane {
  private loop: Promise<void> | undefined;
  private isWoken = false;
  private isStopping = false;

  constructor(
    private readonly kind: string,
    private readonly handler: JobHandler,
    private readonly context: LaneContext,
  ) {}

  get isBusy(): boolean {
    return this.loop !== undefined;
  }

  /** Looks at the table now. */
  wake(): void {
    if (this.isStopping) return;
    this.isWoken = true;
    this.loop ??= this.drain()
      // A database that can't be written to now is tried again at the next look.
      .catch((error: unknown) =>
        this.context.logger.error({ err: error, job: this.kind }, 'jobs could not be read'),
      )
      .finally(() => (this.loop = undefined));
  }

  async idle(): Promise<void> {
    await this.loop;
  }

  /** Ends after the job in hand. */
  async stop(): Promise<void> {
    this.isStopping = true;
    await this.loop;
  }

  private async drain(): Promise<void> {
    while (this.isWoken && !this.isStopping) {
      this.isWoken = false;
      for (let job = await this.claim(); job; job = await this.claim()) await this.run(job);
    }
  }

  private async claim(): Promise<Job | null> {
    const { db, clock } = this.context;
    const where = { state: 'queued', kind: this.kind, runAfter: { [Op.lte]: clock() } } as const;
    // Most looks find nothing and need no write lock.
    if (this.isStopping || (await Job.count({ where })) === 0) return null;
    return db.transaction(async (transaction) => {
      const order: [string, string][] = [
        ['runAfter', 'ASC'],
        ['createdAt', 'ASC'],
      ];
      const job = await Job.findOne({ where, order, transaction });
      return job ? job.update({ state: 'running', attempts: job.attempts + 1 }, { transaction }) : null;
    });
  }

  private async run(job: Job): Promise<void> {
    try {
      await this.handler(job.payload);
      await job.update({ state: 'done', error: null });
    } catch (error) {
      this.context.logger.error({ err: error, job: this.kind }, 'job failed');
      await this.putBack(job, error);
    }
  }

  private async putBack(job: Job, error: unknown): Promise<void> {
    const { db, clock } = this.context;
    const delayMs = firstDelayMs * 4 ** (job.attempts - 1);
    await db.transaction(async (transaction) => {
      const isTwinQueued =
        job.dedupeKey !== null &&
        (await Job.count({ where: { state: 'queued', dedupeKey: job.dedupeKey }, transaction })) > 0;
      await job.update(
        {
          // A queued twin would break the coalescing index; it does the work of this one.
          state: job.attempts >= maxAttempts || isTwinQueued ? 'failed' : 'queued',
          error: error instanceof Error ? error.message : String(error),
          runAfter: new Date(clock().getTime() + delayMs),
        },
        { transaction },
      );
    });
  }
}
