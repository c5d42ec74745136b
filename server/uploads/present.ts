import type { Upload as UploadContract } from '@/lib/contract/uploads';

import type { Upload } from '../db/models';

/** An upload for its owner. */
export function presentUpload(upload: Upload): UploadContract {
  const { id, bankId, filename, bytes, state, progressFraction, recognised, result, problem } = upload;
  return {
    id,
    bankId,
    filename,
    bytes,
    state,
    progressFraction,
    recognised: recognised ?? null,
    result: result ?? null,
    problem: problem ?? null,
    createdAt: upload.createdAt.toISOString(),
  };
}
