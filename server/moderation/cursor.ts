import { z } from 'zod';

import { idSchema, instantSchema } from '@/lib/contract/fields';

import { AppError } from '../errors';

/** The last entry of a page: where the next one goes on. */
export interface Cursor {
  severity: number;
  submittedAt: Date;
  checkId: string;
}

const contentSchema = z.tuple([z.number().int(), instantSchema, idSchema]);

/** As opaque text for addresses. */
export function writeCursor({ severity, submittedAt, checkId }: Cursor): string {
  return Buffer.from(JSON.stringify([severity, submittedAt.toISOString(), checkId])).toString('base64url');
}

/** @throws AppError invalid for text that was not written by writeCursor */
export function readCursor(text: string): Cursor {
  try {
    const content = contentSchema.parse(JSON.parse(Buffer.from(text, 'base64url').toString('utf8')));
    const [severity, submittedAt, checkId] = content;
    return { severity, submittedAt: new Date(submittedAt), checkId };
  } catch {
    throw new AppError('invalid', undefined, {
      after: 'This place in the queue is not known. Start from the top.',
    });
  }
}
