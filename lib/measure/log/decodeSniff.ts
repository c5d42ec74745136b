import { logFailure } from './logTypes';
import type { LogFailure } from './logTypes';

/** An encoding by the name that both the browser's TextDecoder and the server's decoder know. */
export type TextEncodingName = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';

/** The encoding found and the length of its byte order mark, which is not part of the text. */
export interface SniffedEncoding {
  ok: true;
  encoding: TextEncodingName;
  bomBytes: number;
}

const marks: [number[], TextEncodingName][] = [
  [[0xef, 0xbb, 0xbf], 'utf-8'],
  [[0xff, 0xfe], 'utf-16le'],
  [[0xfe, 0xff], 'utf-16be'],
];

// First bytes of files that are often sent by mistake, and what to do about each.
const binaryKinds: [number[], string][] = [
  [[0x50, 0x4b, 0x03, 0x04], 'This is a spreadsheet or zip file. Save the sheet as CSV and send that.'],
  [[0xd0, 0xcf, 0x11, 0xe0], 'This is an old spreadsheet file. Save the sheet as CSV and send that.'],
  [[0x25, 0x50, 0x44, 0x46], 'This is a PDF. Send the log itself, as CSV.'],
  [[0x1f, 0x8b], 'This file is compressed. Unpack it and send the CSV inside.'],
];

const startsWith = (bytes: Uint8Array, start: number[]) =>
  start.every((byte, index) => bytes[index] === byte);

/**
 * Tells the encoding of a text file from its first bytes (a few thousand are enough).
 * Without a byte order mark, UTF-16 is known by its zero bytes, UTF-8 by being valid; anything else that looks like
 * text is Windows-1252. A file that is not text is an expected failure.
 */
export function decodeSniff(bytes: Uint8Array): SniffedEncoding | LogFailure {
  if (bytes.length === 0) return logFailure('empty', 'The file is empty.');
  const mark = marks.find(([start]) => startsWith(bytes, start));
  if (mark) {
    return bytes.length === mark[0].length
      ? logFailure('empty', 'The file is empty.')
      : { ok: true, encoding: mark[1], bomBytes: mark[0].length };
  }
  const kind = binaryKinds.find(([start]) => startsWith(bytes, start));
  if (kind) return logFailure('binary', kind[1]);
  const encoding = wideEncoding(bytes) ?? (hasControls(bytes) ? undefined : narrowEncoding(bytes));
  return encoding
    ? { ok: true, encoding, bomBytes: 0 }
    : logFailure('binary', 'This file is not text. Send the log as CSV.');
}

const wideEncoding = (bytes: Uint8Array): TextEncodingName | undefined => {
  const zeros = [0, 0];
  bytes.forEach((byte, index) => {
    if (byte === 0) zeros[index % 2] = (zeros[index % 2] ?? 0) + 1;
  });
  const [even = 0, odd = 0] = zeros;
  const half = bytes.length / 2;
  // Latin text in UTF-16 has a zero in nearly every other byte, and none in the rest.
  if (odd > 0.6 * half && even < 0.02 * half) return 'utf-16le';
  if (even > 0.6 * half && odd < 0.02 * half) return 'utf-16be';
  return undefined;
};

const hasControls = (bytes: Uint8Array): boolean => {
  let controls = 0;
  for (const byte of bytes) {
    if (byte === 0) return true;
    if (byte < 9 || (byte > 13 && byte < 32)) controls += 1;
  }
  return controls > bytes.length * 0.01;
};

const narrowEncoding = (bytes: Uint8Array): TextEncodingName => {
  let index = 0;
  while (index < bytes.length) {
    const lead = bytes[index] ?? 0;
    const following =
      lead < 0x80
        ? 0
        : lead >= 0xc2 && lead < 0xe0
          ? 1
          : lead < 0xc2
            ? -1
            : lead < 0xf0
              ? 2
              : lead < 0xf5
                ? 3
                : -1;
    if (following < 0) return 'windows-1252';
    for (let step = 1; step <= following; step += 1) {
      // The sample may end within a character.
      if (index + step >= bytes.length) return 'utf-8';
      if (((bytes[index + step] ?? 0) & 0xc0) !== 0x80) return 'windows-1252';
    }
    index += following + 1;
  }
  return 'utf-8';
};
