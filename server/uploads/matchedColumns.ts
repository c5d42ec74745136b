import type { LogMapping, RecognisedLog } from '@/lib/contract/uploads';

import { Upload } from '../db/models';

/** The columns of a log as its owner matched them, and the header that its instrument writes. */
export type MatchedColumns = Pick<RecognisedLog, 'header' | 'mapping'>;

/** Enough for every meter one person has. */
const mostRemembered = 40;

/**
 * How an owner matched the columns of earlier logs, the newest first: an instrument is known by the header it writes. Kept
 * with the logs on the server, so that it holds on every device and goes with the account.
 */
export async function findMatched(ownerId: string): Promise<MatchedColumns[]> {
  const rows = await Upload.findAll({
    where: { ownerId, isMatched: true },
    attributes: ['recognised'],
    order: [['createdAt', 'DESC']],
    limit: mostRemembered,
  });
  return rows.flatMap(({ recognised }) =>
    recognised && recognised.questions.length === 0
      ? [{ header: recognised.header, mapping: recognised.mapping }]
      : [],
  );
}

/** A log's columns, read as those of the newest matched log with the same header. */
export function withMatched(
  recognised: RecognisedLog,
  matched: readonly MatchedColumns[],
): { recognised: RecognisedLog; isRemembered: boolean } {
  const { header, mapping } = recognised;
  const same = matched.find(
    (one) => one.mapping.delimiter === mapping.delimiter && one.header.join('\n') === header.join('\n'),
  );
  if (!same || header.length === 0) return { recognised, isRemembered: false };
  // A preamble may be of another length, and the part that was counted belongs to that log.
  const remembered = { ...same.mapping, headerLine: mapping.headerLine, window: null };
  const isRemembered = !isSameReading(remembered, mapping) || recognised.questions.length > 0;
  return { recognised: { ...recognised, mapping: remembered, questions: [] }, isRemembered };
}

/** Whether two mappings read a log alike, whatever part of it they count. */
export function isSameReading(one: LogMapping, other: LogMapping): boolean {
  const key = ({ columns, delimiter, decimal, timeFormat, dischargeSign = 'auto' }: LogMapping) =>
    JSON.stringify([
      [...columns]
        .sort((a, b) => a.index - b.index)
        .map(({ index, quantity, unit }) => [index, quantity, unit]),
      [delimiter, decimal, timeFormat, dischargeSign],
    ]);
  return key(one) === key(other);
}
