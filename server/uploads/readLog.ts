import iconv from 'iconv-lite';

import { limits } from '@/lib/contract/limits';
import type { LogMapping, LogResult, RecognisedLog } from '@/lib/contract/uploads';
import {
  createLogReader,
  decodeSniff,
  integrateLog,
  joinLogs,
  type LogFailure,
  type LogFile,
  type LogSamples,
  recogniseColumns,
} from '@/lib/measure';
import { formatCount } from '@/lib/units';

import { type MatchedColumns, withMatched } from './matchedColumns';
import type { FileStorage } from './storage';

export interface StoredFile {
  storageKey: string;
  bytes: number;
  filename: string;
}

interface ReadRequest {
  storage: Pick<FileStorage, 'open'>;
  /** The log, or the files it was split into. */
  files: readonly [StoredFile, ...StoredFile[]];
  /** The first file's columns as the owner settled them; null = to be recognised. */
  settled: RecognisedLog | null;
  /** How the owner matched the columns of earlier logs, the newest first. */
  matched: readonly MatchedColumns[];
  onProgress: (fraction: number) => void;
}

export type ReadOutcome =
  | { state: 'ready'; recognised: RecognisedLog; result: LogResult; problem: null }
  | { state: 'unclear'; recognised: RecognisedLog; result: null; problem: string | null }
  | { state: 'failed'; recognised: RecognisedLog | null; result: null; problem: string };

/** The part of a file that its encoding and columns are told from. */
const headBytes = 256 * 1024;

const rememberedWarning = {
  code: 'columnsRemembered',
  text: 'The columns are read as you matched them in an earlier log with the same header.',
};

/**
 * Reads a stored log: encoding, columns, then every row in pieces, then the integral. What can't be told from the file
 * ends as `unclear` with questions; a file that gives no result ends as `failed` with the reason in words. Files of one log
 * are read by the columns of the first where they have its header, and joined by their stamps.
 */
export async function readLog(request: ReadRequest): Promise<ReadOutcome> {
  const { storage, files, matched, onProgress } = request;
  const [first, ...others] = files;
  const bytes = files.reduce((sum, file) => sum + file.bytes, 0);
  let bytesDone = 0;
  const reading = {
    storage,
    onBytes: (count: number) => onProgress(Math.min(0.95, (bytesDone += count) / bytes)),
  };

  const opened = await openFile(storage, first, request.settled, matched);
  if ('ok' in opened) return failed(null, opened);
  const { recognised } = opened;
  if (recognised.questions.length > 0) return { state: 'unclear', recognised, result: null, problem: null };
  const samples = await readRows(reading, first, opened, limits.logRows.max);
  if (!samples.ok) return failed(recognised, named(files, first, samples));

  const read: LogFile[] = [{ name: first.filename, samples }];
  let rowsLeft = limits.logRows.max - samples.rowsRead;
  for (const file of others) {
    const next = await openLike(storage, file, recognised, matched);
    if ('ok' in next) return failed(recognised, named(files, file, next));
    const more = await readRows(reading, file, next, rowsLeft);
    if (!more.ok) return failed(recognised, named(files, file, more));
    rowsLeft -= more.rowsRead;
    read.push({ name: file.filename, samples: more });
  }
  const log = joinLogs(read);
  if (!log.ok) return failed(recognised, log);
  if (opened.isRemembered) log.warnings.unshift(rememberedWarning);

  const { window, dischargeSign, gaps } = recognised.mapping;
  const integrated = integrateLog(log, { window, dischargeSign, gaps });
  if (integrated.ok) return { state: 'ready', recognised, result: integrated, problem: null };
  return integrated.reason === 'signUnclear'
    ? { state: 'unclear', recognised: askSign(recognised, integrated), result: null, problem: null }
    : failed(recognised, integrated);
}

interface OpenedFile {
  recognised: RecognisedLog;
  /** Its columns are read as those of an earlier log. */
  isRemembered: boolean;
}

async function openFile(
  storage: ReadRequest['storage'],
  { storageKey, bytes }: StoredFile,
  settled: RecognisedLog | null,
  matched: readonly MatchedColumns[],
): Promise<OpenedFile | LogFailure> {
  const head = await readHead(storage, storageKey);
  const sniffed = decodeSniff(head);
  if (!sniffed.ok) return sniffed;
  if (settled) return { recognised: settled, isRemembered: false };
  const found = recognise(iconv.decode(head, sniffed.encoding), sniffed.encoding, bytes);
  return 'ok' in found ? found : withMatched(found, matched);
}

/** A further file of a log: by the columns of the first one where its header is the same. */
async function openLike(
  storage: ReadRequest['storage'],
  file: StoredFile,
  { header, mapping }: RecognisedLog,
  matched: readonly MatchedColumns[],
): Promise<OpenedFile | LogFailure> {
  const opened = await openFile(storage, file, null, [{ header, mapping }, ...matched]);
  if ('ok' in opened || opened.recognised.questions.length === 0) return opened;
  return {
    ok: false,
    reason: 'filesDiffer',
    message: 'Its columns are written differently from those of the first file. Upload it by itself.',
  };
}

async function readRows(
  { storage, onBytes }: { storage: ReadRequest['storage']; onBytes: (count: number) => void },
  { storageKey }: StoredFile,
  { recognised: { encoding, mapping } }: OpenedFile,
  maxRows: number,
): Promise<LogSamples | LogFailure> {
  const reader = createLogReader({ mapping, maxRows });
  const decoder = iconv.getDecoder(encoding);
  for await (const piece of (await storage.open(storageKey)) as AsyncIterable<Buffer>) {
    const failure = reader.push(decoder.write(piece));
    if (failure) return failure.reason === 'tooManyRows' ? tooManyRows(failure) : failure;
    onBytes(piece.length);
  }
  reader.push(decoder.end() ?? '');
  return reader.finish();
}

/** The limit is of the whole log, whatever was left of it for a further file. */
const tooManyRows = (failure: LogFailure): LogFailure => ({
  ...failure,
  message: `The log has more than ${formatCount(limits.logRows.max)} rows.`,
});

function recognise(head: string, encoding: string, bytes: number): RecognisedLog | LogFailure {
  // The last line of a piece is cut; the last line of a whole file is not.
  const sample = bytes > headBytes ? head.slice(0, head.lastIndexOf('\n') + 1 || head.length) : head;
  const found = recogniseColumns(sample);
  if (!found.ok) return found;
  const { mapping, header, sampleRows, questions } = found;
  const asked: LogMapping = { ...mapping, window: mapping.window ?? null };
  return { encoding, mapping: asked, header, sampleRows, questions };
}

function askSign(recognised: RecognisedLog, { message }: LogFailure): RecognisedLog {
  const question = { field: 'dischargeSign', text: message, choices: ['positive', 'negative'] };
  return { ...recognised, questions: [question] };
}

function failed(recognised: RecognisedLog | null, { message, row }: LogFailure): ReadOutcome {
  const problem = row === undefined ? message : `${message} (line ${row})`;
  return { state: 'failed', recognised, result: null, problem };
}

/** Of several files, says which one it is about. */
const named = (files: readonly StoredFile[], { filename }: StoredFile, failure: LogFailure): LogFailure =>
  files.length === 1 ? failure : { ...failure, message: `${filename}: ${failure.message}` };

async function readHead(storage: Pick<FileStorage, 'open'>, key: string): Promise<Buffer> {
  const pieces: Buffer[] = [];
  const head = await storage.open(key, { end: headBytes - 1 });
  for await (const piece of head as AsyncIterable<Buffer>) pieces.push(piece);
  return Buffer.concat(pieces);
}
