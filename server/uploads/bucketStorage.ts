import { createReadStream } from 'node:fs';
import { rm, stat } from 'node:fs/promises';
import { Readable } from 'node:stream';

import {
  DeleteObjectCommand,
  GetObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';

import { clearIncoming, incomingDirOf } from './incoming';
import { assertKey, type BucketSettings, type FileStorage, isKey, newKey, StorageError } from './storage';

const prefix = 'files/';
/** A store that hangs must not hang the request with it. */
const connectionTimeoutMs = 5_000;
const idleTimeoutMs = 30_000;

/** Files in a bucket, which belongs to this exchange alone. They arrive in the local folder first. */
export function createBucketStorage(uploadsDir: string, settings: BucketSettings): FileStorage {
  const { endpoint, bucket: Bucket, region } = settings;
  const incomingDir = incomingDirOf(uploadsDir);
  const client = new S3Client({
    region,
    endpoint,
    // Stores other than the client's own know a bucket by its path only, and no trailing checksums.
    forcePathStyle: endpoint !== undefined,
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    requestHandler: { connectionTimeout: connectionTimeoutMs, socketTimeout: idleTimeoutMs },
  });
  const objectOf = (key: string) => {
    assertKey(key);
    return { Bucket, Key: prefix + key };
  };
  const put = async (Body: Readable | Uint8Array, ContentLength: number, key = newKey()) => {
    await reach(() => client.send(new PutObjectCommand({ ...objectOf(key), Body, ContentLength })));
    return key;
  };
  return {
    incomingDir,
    async save(incomingPath, wantedKey) {
      const { size } = await stat(incomingPath);
      const key = await put(createReadStream(incomingPath), size, wantedKey);
      await rm(incomingPath, { force: true });
      return key;
    },
    write: (content) => put(content, content.byteLength),
    async open(key, { start = 0, end } = {}) {
      const isWhole = start === 0 && end === undefined;
      const Range = isWhole ? undefined : `bytes=${start}-${end ?? ''}`;
      const wanted = { ...objectOf(key), Range };
      const { Body } = await reach(() => client.send(new GetObjectCommand(wanted)));
      if (!(Body instanceof Readable)) throw new StorageError('an object without a body');
      return Readable.from(reading(Body), { objectMode: false });
    },
    async remove(key) {
      const unwanted = objectOf(key);
      await reach(() => client.send(new DeleteObjectCommand(unwanted)));
    },
    async keys() {
      const keys: string[] = [];
      let ContinuationToken: string | undefined;
      do {
        const page = { Bucket, Prefix: prefix, ContinuationToken };
        const { Contents = [], NextContinuationToken } = await reach(() =>
          client.send(new ListObjectsV2Command(page)),
        );
        keys.push(...Contents.map(({ Key = '' }) => Key.slice(prefix.length)).filter(isKey));
        ContinuationToken = NextContinuationToken;
      } while (ContinuationToken !== undefined);
      return keys;
    },
    clearIncoming: () => clearIncoming(incomingDir),
    close: () => client.destroy(),
  };
}

async function reach<T>(ask: () => Promise<T>): Promise<T> {
  try {
    return await ask();
  } catch (error) {
    throw new StorageError(error);
  }
}

/** What breaks off in the middle is the store's failure too. */
async function* reading(body: Readable): AsyncGenerator<Buffer> {
  try {
    for await (const piece of body as AsyncIterable<Buffer>) yield piece;
  } catch (error) {
    throw new StorageError(error);
  }
}
