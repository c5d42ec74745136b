import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { createStorage } from '@/server/uploads/createStorage';
import { type FileStorage, readWhole, StorageError } from '@/server/uploads/storage';

import {
  type FakeBucket,
  fakeBucketName,
  fakeCredentials,
  fakeRegion,
  startFakeBucket,
} from '../support/fakeBucket';

Object.assign(process.env, fakeCredentials);

let folder: string;
let bucket: FakeBucket;
let storage: FileStorage;

beforeAll(async () => {
  bucket = await startFakeBucket();
});
afterAll(() => bucket.stop());

const settingsOf = (kind: string) => ({
  uploadsDir: folder,
  bucket:
    kind === 'a folder'
      ? undefined
      : { bucket: fakeBucketName, endpoint: bucket.endpoint, region: fakeRegion },
});

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'ebbline-storage-'));
  bucket.objects.clear();
  bucket.requests.length = 0;
  bucket.pageSize = 1000;
  bucket.failWith = null;
});
afterEach(() => {
  storage.close();
  rmSync(folder, { recursive: true, force: true });
});

function arrive(content: string | Buffer): string {
  mkdirSync(storage.incomingDir, { recursive: true });
  const path = join(storage.incomingDir, 'arrived');
  writeFileSync(path, content);
  return path;
}

const missing = 'f'.repeat(32);

describe.each(['a folder', 'a bucket'])('%s', (kind) => {
  beforeEach(() => {
    storage = createStorage(settingsOf(kind));
  });

  it('gives back what arrived, byte for byte, and leaves the incoming folder empty', async () => {
    // Larger than any buffer on the way, and no text.
    const content = Buffer.from(Uint8Array.from({ length: 700_001 }, (_none, place) => (place * 31) % 256));
    const key = await storage.save(arrive(content));
    expect(key).toMatch(/^[0-9a-f]{32}$/);
    expect((await readWhole(storage, key)).equals(content)).toBe(true);
    expect(readdirSync(storage.incomingDir)).toEqual([]);
  });

  it('gives back what was written from memory', async () => {
    const key = await storage.write(Buffer.from('a small file'));
    expect((await readWhole(storage, key)).toString()).toBe('a small file');
  });

  it('gives the beginning of a file where an end is named', async () => {
    const key = await storage.write(Buffer.from('0123456789'));
    const pieces: Buffer[] = [];
    for await (const piece of await storage.open(key, { end: 3 })) pieces.push(piece as Buffer);
    expect(Buffer.concat(pieces).toString()).toBe('0123');
  });

  it('tells its keys, and forgets what is removed, also twice', async () => {
    bucket.pageSize = 2;
    const keys = [];
    for (const content of ['a', 'b', 'c', 'd', 'e']) keys.push(await storage.write(Buffer.from(content)));
    expect((await storage.keys()).sort()).toEqual([...keys].sort());
    await storage.remove(keys[0]!);
    await storage.remove(keys[0]!);
    expect((await storage.keys()).sort()).toEqual(keys.slice(1).sort());
  });

  it('clears what arrived and was never saved', async () => {
    const kept = await storage.write(Buffer.from('kept'));
    arrive('half');
    await storage.clearIncoming();
    expect(readdirSync(storage.incomingDir)).toEqual([]);
    expect(await storage.keys()).toEqual([kept]);
  });

  it.each(['../../etc/passwd', 'tmp/x', '', 'F'.repeat(32), `${missing}0`])(
    'refuses %j, which it never gave out',
    async (key) => {
      await expect(storage.open(key)).rejects.toThrow(RangeError);
      await expect(storage.remove(key)).rejects.toThrow(RangeError);
    },
  );

  it('fails to read what is not there', async () => {
    await expect(readWhole(storage, missing)).rejects.toThrow();
  });
});

describe('a bucket', () => {
  beforeEach(() => {
    storage = createStorage(settingsOf('a bucket'));
  });

  it('is asked by path, with plain bytes under a prefix of their own', async () => {
    const key = await storage.save(arrive('volts'));
    await readWhole(storage, key);
    await storage.keys();
    await storage.remove(key);
    const [put, get, list, remove] = bucket.requests.map((request) => request.replace(/\?.*$/, ''));
    const path = `/${fakeBucketName}/files/${key}`;
    expect([put, get, remove]).toEqual([`PUT ${path}`, `GET ${path}`, `DELETE ${path}`]);
    expect(list).toMatch(new RegExp(`^GET /${fakeBucketName}/?$`));
  });

  it('keeps nothing on this disk', async () => {
    const key = await storage.save(arrive('volts'));
    expect(bucket.objects.get(`files/${key}`)?.toString()).toBe('volts');
    expect(readdirSync(folder)).toEqual(['tmp']);
  });

  it('leaves alone what others put there', async () => {
    bucket.objects.set('files/notes.txt', Buffer.from('x'));
    bucket.objects.set(`backup/${missing}`, Buffer.from('x'));
    expect(await storage.keys()).toEqual([]);
  });

  it.each([403, 500])(
    'that answers %s is a failure of the store',
    async (status) => {
      bucket.failWith = status;
      const path = arrive('volts');
      await expect(storage.save(path)).rejects.toThrow(StorageError);
      await expect(storage.write(Buffer.from('x'))).rejects.toThrow(StorageError);
      await expect(storage.open(missing)).rejects.toThrow(StorageError);
      await expect(storage.keys()).rejects.toThrow(StorageError);
    },
    30_000,
  );

  it('that is not there is a failure of the store', async () => {
    storage.close();
    const nobody = { bucket: fakeBucketName, endpoint: 'http://127.0.0.1:9', region: fakeRegion };
    storage = createStorage({ uploadsDir: folder, bucket: nobody });
    await expect(storage.write(Buffer.from('x'))).rejects.toThrow(StorageError);
  }, 30_000);
});
