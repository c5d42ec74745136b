import { Job, OutboxMail } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';

/** Has a failed job tried again from its first attempt. Errors: `notFound`, `conflict` when it does not stand failed. */
export async function retryJob({ clock, db, jobs }: Deps, jobId: string): Promise<void> {
  await db.transaction(async (transaction) => {
    const job = await Job.findByPk(jobId, { transaction });
    if (!job) throw new AppError('notFound');
    if (job.state !== 'failed') throw new AppError('conflict', 'This job does not stand failed any more.');
    const { dedupeKey } = job;
    const twin = dedupeKey && (await Job.count({ where: { state: 'queued', dedupeKey }, transaction })) > 0;
    // A twin that waits does its work.
    const again = twin ? { state: 'done' as const } : { state: 'queued' as const, attempts: 0 };
    await job.update({ ...again, error: null, runAfter: clock() }, { transaction });
  });
  jobs.wake();
}

/** Has a mail handed over again. Errors: `notFound`, `conflict` when it has been sent. */
export async function retryMail({ db, jobs }: Deps, mailId: string): Promise<void> {
  await db.transaction(async (transaction) => {
    const mail = await OutboxMail.findByPk(mailId, { transaction });
    if (!mail) throw new AppError('notFound');
    if (mail.state === 'sent') throw new AppError('conflict', 'This mail has been sent.');
    await mail.update({ state: 'queued', problem: null }, { transaction });
    await jobs.enqueue({ kind: 'sendMail', dedupeKey: 'sendMail' }, transaction);
  });
}
