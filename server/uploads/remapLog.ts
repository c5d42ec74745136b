import { Op } from 'sequelize';

import type { LogMapping } from '@/lib/contract/uploads';
import { createLogReader } from '@/lib/measure';

import { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Actor } from '../policies';
import { isSameReading } from './matchedColumns';
import { findOwnUpload } from './queries';

/**
 * Has a log read again, its columns or window corrected by its owner. Columns so matched are remembered for later logs with
 * the same header.
 * @throws AppError notFound, invalid (the mapping can't be followed), conflict (being read, or a check stands on it)
 */
export async function remapLog(
  { db, jobs }: Deps,
  actor: Extract<Actor, { userId: string }>,
  uploadId: string,
  mapping: LogMapping,
): Promise<void> {
  await db.transaction(async (transaction) => {
    const upload = await findOwnUpload(actor, 'uploads.update', uploadId, transaction);
    const refusal = createLogReader({ mapping }).push('');
    if (refusal) throw new AppError('invalid', undefined, { mapping: refusal.message });
    const { recognised, state } = upload;
    if (state === 'received' || state === 'working')
      throw new AppError('conflict', 'This log is being read. Wait until it is done.');
    if (!recognised) throw new AppError('conflict', 'No table was found in this file. Upload another.');
    const uses = await Check.count({ where: { uploadId, state: { [Op.ne]: 'withdrawn' } }, transaction });
    if (uses > 0)
      throw new AppError('conflict', 'A check stands on this log as it was read. Upload the file again.');
    await upload.update(
      {
        recognised: { ...recognised, mapping, questions: [] },
        isMatched:
          upload.isMatched || recognised.questions.length > 0 || !isSameReading(mapping, recognised.mapping),
        state: 'received',
        progressFraction: 0,
        result: null,
        problem: null,
      },
      { transaction },
    );
    await jobs.enqueue({ kind: 'integrateLog', payload: { uploadId } }, transaction);
  });
}
