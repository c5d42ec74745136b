import type { Logger } from 'pino';
import { Op, type Sequelize, type Transaction } from 'sequelize';

import { Job } from '../db/models';

export type JobHandler = (payload: Record<string, unknown>) => Promise<void>;

interface JobRequest {
  kind: string;
  payload?: Record<string, unknown>;
  /** Queued jobs of one key are one job: a burst asks once. */
  dedupeKey?: string;
  runAfter?: Date;
}

const maxAttempts = 5;
/** How often the table is looked at without being woken, for jobs due later. */
const pollMs = 2_000;

/**
 * The jobs table and its worker loop. A job is enqueued in the transaction that causes it and so survives a kill;
 * one that was running when the process died is run again, so handlers must stand a second run.
 */
export class JobRunner {
  private readonly handlers = new Map<string, JobHandler>();
  private timer: NodeJS.Timeout | undefined;
  private loop: Promise<void> | undefined;
  private isWoken = false;
  private isStopping = false;

  constructor(
    private readonly db: Sequelize,
    private readonly logger: Logger,
    private readonly clock: () => Date,
  ) {}

  handle(kind: string, handler: JobHandler): void {
    this.handlers.set(kind, handler);
  }

  async enqueue(request: JobRequest, transaction: Transaction): Promise<void> {
    const { kind, payload = {}, dedupeKey = null, runAfter = this.clock() } = request;
    await Job.bulkCreate([{ kind, payload, dedupeKey, state: 'queued', runAfter }], {
      transaction,
      ignoreDuplicates: true,
    });
    transaction.afterCommit(() => this.wake());
  }

  async start(): Promise<void> {
    await this.requeueInterrupted();
    this.timer = setInterval(() => this.wake(), pollMs);
    this.wake();
  }

  /** Looks at the table now. */
  wake(): void {
    if (this.isStopping) return;
    this.isWoken = true;
    this.loop ??= this.drain().finally(() => (this.loop = undefined));
  }

  /** Ends after the job in hand. */
  async stop(): Promise<void> {
    this.isStopping = true;
    clearInterval(this.timer);
    await this.loop;
  }

  /** Resolves when nothing is due any more; for tests and scripts. */
  async settle(): Promise<void> {
    this.wake();
    await this.loop;
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

  private async drain(): Promise<void> {
    while (this.isWoken && !this.isStopping) {
      this.isWoken = false;
      for (let job = await this.claim(); job && !this.isStopping; job = await this.claim())
        await this.run(job);
    }
  }

  private async claim(): Promise<Job | null> {
    if (this.isStopping) return null;
    const due = {
      state: 'queued',
      kind: [...this.handlers.keys()],
      runAfter: { [Op.lte]: this.clock() },
    } as const;
    return this.db.transaction(async (transaction) => {
      const job = await Job.findOne({
        where: due,
        order: [
          ['runAfter', 'ASC'],
          ['createdAt', 'ASC'],
        ],
        transaction,
      });
      return job ? job.update({ state: 'running', attempts: job.attempts + 1 }, { transaction }) : null;
    });
  }

  private async run(job: Job): Promise<void> {
    try {
      await this.handlers.get(job.kind)!(job.payload);
      await job.update({ state: 'done', error: null });
    } catch (error) {
      this.logger.error({ err: error, job: job.kind }, 'job failed');
      const isLast = job.attempts >= maxAttempts;
      const delayMs = 1_000 * 4 ** (job.attempts - 1);
      await job.update({
        // A queued twin would break the coalescing index; it does the work of this one.
        state: isLast || (await this.hasQueuedTwin(job)) ? 'failed' : 'queued',
        error: error instanceof Error ? error.message : String(error),
        runAfter: new Date(this.clock().getTime() + delayMs),
      });
    }
  }

  private async hasQueuedTwin({ dedupeKey }: Job): Promise<boolean> {
    return dedupeKey !== null && (await Job.count({ where: { state: 'queued', dedupeKey } })) > 0;
  }
}
