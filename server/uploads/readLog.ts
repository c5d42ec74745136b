import iconv from 'iconv-lite';

import { limits } from '@/lib/contract/limits';
import type { LogResult, RecognisedLog } from '@/lib/contract/uploads';
import { createLogReader, decodeSniff, integrateLog, type LogFailure, recogniseColumns } from '@/lib/measure';

import type { FileStorage } from './storage';

interface ReadRequest {
  storage: Pick<FileStorage, 'open'>;
  storageKey: string;
  bytes: number;
  /** As the owner settled it; null = to be recognised. */
  settled: RecognisedLog | null;
  onProgress: (fraction: number) => void;
}

export type ReadOutcome =
  | { state: 'ready'; recognised: RecognisedLog; result: LogResult; problem: null }
  | { state: 'unclear'; recognised: RecognisedLog; result: null; problem: string | null }
  | { state: 'failed'; recognised: RecognisedLog | null; result: null; problem: string };

/** The part of a file that its encoding and columns are told from. */
const headBytes = 256 * 1024;

/**
 * Reads a stored log: encoding, columns, then every row in pieces, then the integral. What can't be told from the file
 * ends as `unclear` with questions; a file that gives no result ends as `failed` with the reason in words.
 */
export async function readLog(request: ReadRequest): Promise<ReadOutcome> {
  const { storage, storageKey, bytes, onProgress } = request;
  const head = await readHead(storage, storageKey);
  const sniffed = decodeSniff(head);
  if (!sniffed.ok) return failed(null, sniffed);
  const { encoding } = sniffed;
  const recognised = request.settled ?? recognise(iconv.decode(head, encoding), encoding, bytes);
  if ('ok' in recognised) return failed(null, recognised);
  if (recognised.questions.length > 0) return { state: 'unclear', recognised, result: null, problem: null };

  const { mapping } = recognised;
  const reader = createLogReader({ mapping, maxRows: limits.logRows.max });
  const decoder = iconv.getDecoder(encoding);
  let bytesRead = 0;
  for await (const piece of (await storage.open(storageKey)) as AsyncIterable<Buffer>) {
    const failure = reader.push(decoder.write(piece));
    if (failure) return failed(recognised, failure);
    bytesRead += piece.length;
    onProgress(Math.min(0.95, bytesRead / bytes));
  }
  reader.push(decoder.end() ?? '');
  const samples = reader.finish();
  if (!samples.ok) return failed(recognised, samples);
  const { window, dischargeSign, gaps } = mapping;
  const integrated = integrateLog(samples, { window, dischargeSign, gaps });
  if (integrated.ok) return { state: 'ready', recognised, result: integrated, problem: null };
  return integrated.reason === 'signUnclear'
    ? { state: 'unclear', recognised: askSign(recognised, integrated), result: null, problem: null }
    : failed(recognised, integrated);
}

function recognise(head: string, encoding: string, bytes: number): RecognisedLog | LogFailure {
  // The last line of a piece is cut; the last line of a whole file is not.
  const sample = bytes > headBytes ? head.slice(0, head.lastIndexOf('\n') + 1 || head.length) : head;
  const found = recogniseColumns(sample);
  if (!found.ok) return found;
  const { mapping, header, sampleRows, questions } = found;
  return { encoding, mapping: { ...mapping, window: mapping.window ?? null }, header, sampleRows, questions };
}

function askSign(recognised: RecognisedLog, { message }: LogFailure): RecognisedLog {
  const question = { field: 'dischargeSign', text: message, choices: ['positive', 'negative'] };
  return { ...recognised, questions: [question] };
}

function failed(recognised: RecognisedLog | null, { message, row }: LogFailure): ReadOutcome {
  const problem = row === undefined ? message : `${message} (line ${row})`;
  return { state: 'failed', recognised, result: null, problem };
}

async function readHead(storage: Pick<FileStorage, 'open'>, key: string): Promise<Buffer> {
  const pieces: Buffer[] = [];
  const head = await storage.open(key, { end: headBytes - 1 });
  for await (const piece of head as AsyncIterable<Buffer>) pieces.push(piece);
  return Buffer.concat(pieces);
}
