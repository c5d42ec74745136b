import { Op, type Transaction } from 'sequelize';

import type { CheckFields } from '@/lib/contract/checks';

import type { LoadedBank } from '../banks/queries';
import { Check, Upload } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { latestCalendarDate } from '../latestCalendarDate';
import { standingStates } from './queries';
import { type EditedField, settleSources } from './settleSources';

interface Admitted {
  fields: CheckFields;
  upload: Upload | null;
  /** Readings that differ from the log they stand on. */
  edited: EditedField[];
}

interface AdmissionRequest {
  bank: LoadedBank;
  fields: CheckFields;
  checkId: string | null;
}

/**
 * What the schema can't know of a check: its day within the bank's life and free, its log the bank's own and read,
 * its photo the bank's own.
 * Returns the fields with their sources settled against the log.
 * @throws AppError invalid, conflict (a check of this day is there)
 */
export async function admitFields(
  { clock }: Deps,
  { bank, fields, checkId }: AdmissionRequest,
  transaction: Transaction,
): Promise<Admitted> {
  const { testedOn } = fields.reading;
  if (testedOn > latestCalendarDate(clock()))
    throw refuse('reading.testedOn', 'This day lies in the future.');
  if (testedOn.slice(0, 7) < bank.firstUseMonth)
    throw refuse('reading.testedOn', "This day lies before the bank's first use.");
  const twins = await Check.count({
    where: {
      bankId: bank.id,
      testedOn,
      state: standingStates,
      ...(checkId ? { id: { [Op.ne]: checkId } } : {}),
    },
    transaction,
  });
  if (twins > 0) {
    const message = 'There is a check of this day already. Edit that one, or give another day.';
    throw new AppError('conflict', message, { 'reading.testedOn': message });
  }
  await refuseOtherPhotos(bank, fields.photoId, transaction);
  const upload = await findUsableUpload(bank, fields.uploadId, transaction);
  if (!upload?.result) return { fields, upload: null, edited: [] };
  const { sources, edited } = settleSources(fields, upload.result);
  return { fields: { ...fields, sources }, upload, edited };
}

async function findUsableUpload(
  { id: bankId, ownerId }: LoadedBank,
  uploadId: string | null,
  transaction: Transaction,
): Promise<Upload | null> {
  if (uploadId === null) return null;
  const upload = await Upload.findOne({ where: { id: uploadId, bankId, ownerId, kind: 'log' }, transaction });
  if (!upload) throw refuse('uploadId', 'This log is not there. Upload it again.');
  if (upload.state !== 'ready')
    throw refuse('uploadId', 'This log has not been read yet. Wait, or type the figures.');
  return upload;
}

async function refuseOtherPhotos(
  { id: bankId, ownerId }: LoadedBank,
  photoId: string | null,
  transaction: Transaction,
): Promise<void> {
  if (photoId === null) return;
  const photos = await Upload.count({ where: { id: photoId, bankId, ownerId, kind: 'photo' }, transaction });
  if (photos === 0) throw refuse('photoId', 'This photo is not there. Take it again.');
}

const refuse = (field: string, message: string) => new AppError('invalid', undefined, { [field]: message });
