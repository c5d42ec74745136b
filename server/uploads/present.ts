import type { Photo as PhotoContract, Upload as UploadContract } from '@/lib/contract/uploads';

import type { Upload } from '../db/models';
import type { Photo } from './queries';

/** An upload for its owner. */
export function presentUpload(upload: Upload): UploadContract {
  const { id, bankId, state, progressFraction, recognised, result, problem } = upload;
  const parts = upload.parts ?? [];
  return {
    id,
    bankId,
    filename: parts.length > 0 ? `${upload.filename} and ${parts.length} more` : upload.filename,
    bytes: parts.reduce((sum, { bytes }) => sum + bytes, upload.bytes),
    state,
    progressFraction,
    recognised: recognised ?? null,
    result: result ?? null,
    problem: problem ?? null,
    createdAt: upload.createdAt.toISOString(),
  };
}

/** A photo for its owner. */
export function presentPhoto({ id, bankId, width, height, createdAt }: Photo): PhotoContract {
  return { id, bankId, width, height, createdAt: createdAt.toISOString() };
}
