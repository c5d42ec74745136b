import { randomUUID } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { mkdir, rm, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

import { ZipArchive } from 'archiver';

import { asRecord, csvHeader, csvLine, type ReleaseRow } from '../publicView/releaseFields';
import { hashOf } from '../uploads/hashOf';

/** A file of a release on its way into the storage. */
export interface WrittenFile {
  name: string;
  type: string;
  path: string;
  bytes: number;
  sha256: string;
}

const types: Record<string, string> = {
  csv: 'text/csv; charset=utf-8',
  jsonl: 'application/jsonl; charset=utf-8',
  json: 'application/json; charset=utf-8',
  md: 'text/markdown; charset=utf-8',
  txt: 'text/plain; charset=utf-8',
  zip: 'application/zip',
};
const linesPerPiece = 500;

/** Writes the files of one release into the folder where arriving files lie; `clear` takes away what was not saved. */
export function createReleaseWriter(incomingDir: string) {
  const files: WrittenFile[] = [];
  const paths: string[] = [];
  const newPath = async () => {
    await mkdir(incomingDir, { recursive: true });
    const path = join(incomingDir, `release-${randomUUID()}`);
    paths.push(path);
    return path;
  };
  const finish = async (name: string, path: string) => {
    const type = types[name.slice(name.lastIndexOf('.') + 1)] ?? types.txt!;
    const file = { name, type, path, bytes: (await stat(path)).size, sha256: await hashOf(path) };
    files.push(file);
    return file;
  };
  return {
    files,
    async text(name: string, content: string) {
      const path = await newPath();
      await writeFile(path, content);
      return finish(name, path);
    },
    /** One line per item, without holding them all. */
    async lines(name: string, lines: Iterable<string>) {
      const path = await newPath();
      await pipeline(Readable.from(inPieces(lines)), createWriteStream(path));
      return finish(name, path);
    },
    /** All files so far as one archive, in a folder of that name. */
    async archive(name: string, folder: string, date: Date) {
      const path = await newPath();
      const zip = new ZipArchive({ zlib: { level: 6 } });
      const written = pipeline(zip, createWriteStream(path));
      for (const file of files)
        zip.append(createReadStream(file.path), { name: `${folder}/${file.name}`, date });
      await Promise.all([zip.finalize(), written]);
      return finish(name, path);
    },
    clear: () => Promise.all(paths.map((path) => rm(path, { force: true }))),
  };
}

function* inPieces(lines: Iterable<string>): Generator<string> {
  let piece: string[] = [];
  for (const line of lines) {
    piece.push(line);
    if (piece.length < linesPerPiece) continue;
    yield `${piece.join('\n')}\n`;
    piece = [];
  }
  if (piece.length > 0) yield `${piece.join('\n')}\n`;
}

export function* csvLines(rows: Iterable<ReleaseRow>): Generator<string> {
  yield csvHeader;
  for (const row of rows) yield csvLine(row);
}

export function* jsonLines(rows: Iterable<ReleaseRow>): Generator<string> {
  for (const row of rows) yield JSON.stringify(asRecord(row));
}
