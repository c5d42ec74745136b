import { createHash, randomUUID } from 'node:crypto';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';

import sharp from 'sharp';

import { photoSchema } from '@/lib/contract/uploads';
import { Check, Upload, User } from '@/server/db/models';
import { erasePersonalData } from '@/server/ownData/erasePersonalData';
import { readWhole } from '@/server/uploads/storage';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { drawPicture } from '../support/pictures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;
let moderator: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  [owner, other, visitor] = [
    await server.client('owner'),
    await server.client('owner'),
    await server.client(),
  ];
  moderator = await server.client('moderator');
  bankId = await createBankOf(owner);
});
afterAll(() => server.stop());

const send = (content: Buffer, filename = 'meter.jpg', client = owner, bank = bankId) =>
  client.send('post', `/api/banks/${bank}/photos`).attach('file', content, filename);

async function store(content: Buffer): Promise<string> {
  const { status, body } = await send(content);
  expect([status, body.error]).toEqual([201, undefined]);
  return photoSchema.parse(body).id;
}

const filesIn = (folder: string) => readdirSync(join(server.deps.config.uploadsDir, folder));

/** Position and owner as a phone writes them. */
const exif = {
  IFD0: { Make: 'Kittiwake', Artist: 'Anna of the shed', Orientation: '6' },
  IFD3: {
    GPSLatitude: '54/1 10/1 0/1',
    GPSLatitudeRef: 'N',
    GPSLongitude: '7/1 53/1 0/1',
    GPSLongitudeRef: 'E',
  },
};

const xmp =
  '<x:xmpmeta xmlns:x="adobe:ns:meta/"><rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">' +
  '<rdf:Description xmlns:dc="http://purl.org/dc/elements/1.1/"><dc:creator>Anna of the shed</dc:creator>' +
  '</rdf:Description></rdf:RDF></x:xmpmeta>';

describe('POST /api/banks/:bankId/photos', () => {
  it.each(['jpeg', 'png', 'webp'] as const)('keeps a %s', async (format) => {
    const { status, body } = await send(await drawPicture().toFormat(format).toBuffer());
    expect(status).toBe(201);
    expect(photoSchema.parse(body)).toMatchObject({ bankId, width: 640, height: 480 });
  });

  it('keeps nothing but upright pixels in sRGB of a photo with position, name, XMP and profile', async () => {
    const sent = await drawPicture(640, 480)
      .withExif(exif)
      .withXmp(xmp)
      .withIccProfile('p3')
      .withMetadata({ orientation: 6 })
      .jpeg()
      .toBuffer();
    const before = await sharp(sent).metadata();
    expect(before).toMatchObject({ orientation: 6, hasProfile: true });
    expect(before.exif?.toString('latin1')).toContain('Kittiwake');
    // The tag that points to the position, and its reference (Exif 2.3, 4.6.3): both byte orders.
    expect(before.exif?.toString('hex')).toMatch(/8825|2588/);
    expect(before.xmp?.toString()).toContain('Anna of the shed');

    const id = await store(sent);
    const upload = await Upload.findByPk(id, { rejectOnEmpty: true });
    for (const key of [upload.storageKey, upload.thumbKey!]) {
      const kept = await readWhole(server.deps.storage, key);
      const metadata = await sharp(kept).metadata();
      expect(metadata).toMatchObject({ format: 'webp', space: 'srgb', hasProfile: false });
      for (const part of ['exif', 'xmp', 'icc', 'iptc', 'orientation', 'comments'] as const)
        expect(metadata[part]).toBeUndefined();
      expect(kept.toString('latin1')).not.toMatch(/Anna|Kittiwake|EXIF|Exif|XMP|ICCP|GPS/);
      // Orientation 6: lying on its side, so width and height change places.
      expect(metadata.width).toBeLessThan(metadata.height);
    }
    expect(upload).toMatchObject({ width: 480, height: 640 });
  });

  it('scales to at most 2000 px, and 320 px for the small one', async () => {
    const id = await store(await drawPicture(3000, 1500).jpeg().toBuffer());
    const sizes = [];
    for (const path of [`/api/photos/${id}`, `/api/photos/${id}/thumb`]) {
      const { width, height } = await sharp((await owner.get(path)).body as Buffer).metadata();
      sizes.push([width, height]);
    }
    expect(sizes).toEqual([
      [2000, 1000],
      [320, 160],
    ]);
  });

  it('does not blow up a small one', async () => {
    const { body } = await send(await drawPicture(40, 30).png().toBuffer());
    expect(body).toMatchObject({ width: 40, height: 30 });
  });

  it('keeps the hash of what was sent, and not what was sent', async () => {
    const sent = await drawPicture().jpeg().toBuffer();
    const upload = await Upload.findByPk(await store(sent), { rejectOnEmpty: true });
    const hashOf = (content: Buffer) => createHash('sha256').update(content).digest('hex');
    expect(upload).toMatchObject({ sha256: hashOf(sent), bytes: sent.length, filename: 'photo.webp' });
    for (const key of await server.deps.storage.keys())
      expect(hashOf(await readWhole(server.deps.storage, key))).not.toBe(upload.sha256);
    expect(filesIn('tmp')).toEqual([]);
  });

  it('knows a picture again that was scaled, compressed and lightened, and not another one', async () => {
    const hashOf = async (content: Buffer) => {
      const { perceptualHash } = await Upload.findByPk(await store(content), { rejectOnEmpty: true });
      return BigInt(`0x${perceptualHash}`);
    };
    const differing = (one: bigint, two: bigint) => (one ^ two).toString(2).replaceAll('0', '').length;
    const first = await hashOf(await drawPicture(640, 480, 2).png().toBuffer());
    const changed = drawPicture(640, 480, 2).resize(411).modulate({ brightness: 1.1 });
    const again = await hashOf(await changed.jpeg({ quality: 40 }).toBuffer());
    const another = await hashOf(await drawPicture(640, 480, 5).png().toBuffer());
    // Bars for 64 bits: unrelated pictures differ in 32 on average, standard deviation 4.
    expect(differing(first, again)).toBeLessThanOrEqual(6);
    expect(differing(first, another)).toBeGreaterThan(16);
  });

  const drawn = () => drawPicture().jpeg().toBuffer();

  it('takes 20 MB', async () => {
    const picture = await drawn();
    // What comes after the end of a JPEG's picture is not part of it.
    const padded = Buffer.concat([picture, Buffer.alloc(20 * 1024 * 1024 - picture.length)]);
    expect((await send(padded)).status).toBe(201);
  }, 30_000);

  it('judges by content, not by name', async () => {
    expect((await send(await drawn(), 'meter.exe')).status).toBe(201);
  });

  it('takes a picture of many frames for its first', async () => {
    const frames = await sharp([await drawn(), await drawPicture(640, 480, 4).jpeg().toBuffer()], {
      join: { animated: true },
    })
      .webp({ loop: 0 })
      .toBuffer();
    const { body } = await send(frames);
    expect(body).toMatchObject({ width: 640, height: 480 });
  });

  it('answers a form without a file with the field', async () => {
    const { status, body } = await owner.send('post', `/api/banks/${bankId}/photos`).field('name', 'x');
    expect([status, body.error.fields]).toEqual([422, { file: 'Choose a picture.' }]);
  });

  it("answers 404 for others' banks without receiving the file, and 401 to visitors", async () => {
    const picture = await drawn();
    expect((await send(picture, 'a.jpg', other)).status).toBe(404);
    expect((await send(picture, 'a.jpg', moderator)).status).toBe(404);
    expect((await send(picture, 'a.jpg', visitor)).status).toBe(401);
    expect((await send(picture, 'a.jpg', owner, randomUUID())).status).toBe(404);
    expect(filesIn('tmp')).toEqual([]);
  });
});

describe('GET /api/photos/:photoId', () => {
  it.each(['', '/thumb'])('%s shows it to its owner alone until a check is sent in with it', async (part) => {
    const id = await store(await drawPicture().jpeg().toBuffer());
    const path = `/api/photos/${id}${part}`;
    const steward = await server.client('steward');
    const answer = await owner.get(path);
    expect(answer.status).toBe(200);
    expect(answer.headers).toMatchObject({
      'content-type': 'image/webp',
      'content-disposition': 'inline; filename="photo.webp"',
      'cache-control': 'private, no-cache',
      'x-content-type-options': 'nosniff',
    });
    for (const client of [other, moderator, steward]) expect((await client.get(path)).status).toBe(404);
    expect((await visitor.get(path)).status).toBe(401);

    const bank = await createBankOf(owner, { name: `For ${id}` });
    await Upload.update({ bankId: bank }, { where: { id } });
    const sent = await owner.send('post', `/api/banks/${bank}/checks`, checkInput({ photoId: id }));
    expect(sent.status).toBe(201);
    for (const client of [moderator, steward]) expect((await client.get(path)).status).toBe(200);
    expect((await other.get(path)).status).toBe(404);
  });

  it('is asked for again each time, and told when nothing changed', async () => {
    const path = `/api/photos/${await store(await drawPicture().jpeg().toBuffer())}`;
    const { etag } = (await owner.get(path)).headers;
    expect((await owner.get(path).set('if-none-match', etag!)).status).toBe(304);
    expect((await visitor.get(path).set('if-none-match', etag!)).status).toBe(401);
  });

  it('answers 404 for what is no photo', async () => {
    const { id } = await Upload.create({
      ...{ ownerId: owner.userId!, bankId, kind: 'log', filename: 'log.csv', storageKey: randomUUID() },
      ...{ sha256: 'c'.repeat(64), bytes: 1, state: 'unclear' },
    });
    for (const address of [id, randomUUID(), 'x']) {
      expect((await owner.get(`/api/photos/${address}`)).status).toBe(404);
      expect((await owner.get(`/api/photos/${address}/thumb`)).status).toBe(404);
    }
  });

  it('is no log either', async () => {
    const id = await store(await drawPicture().jpeg().toBuffer());
    expect((await owner.get(`/api/uploads/${id}`)).status).toBe(404);
  });
});

describe('DELETE /api/photos/:photoId', () => {
  it('removes both files and the row', async () => {
    const before = filesIn('files').length;
    const id = await store(await drawPicture().jpeg().toBuffer());
    expect(filesIn('files')).toHaveLength(before + 2);
    expect((await owner.send('delete', `/api/photos/${id}`)).status).toBe(200);
    expect(filesIn('files')).toHaveLength(before);
    expect((await owner.get(`/api/photos/${id}`)).status).toBe(404);
    expect((await owner.send('delete', `/api/photos/${id}`)).status).toBe(404);
  });

  it('leaves what a check was sent in with', async () => {
    const bank = await createBankOf(owner, { name: 'Kept' });
    const picture = await drawPicture().jpeg().toBuffer();
    const { body: photo } = await send(picture, 'a.jpg', owner, bank);
    await owner.send('post', `/api/banks/${bank}/checks`, checkInput({ photoId: photo.id }));
    const { status, body } = await owner.send('delete', `/api/photos/${photo.id}`);
    expect([status, body.error.code]).toEqual([409, 'conflict']);
    expect((await owner.get(`/api/photos/${photo.id}`)).status).toBe(200);
  });

  it("answers 404 for others' and 401 to visitors", async () => {
    const id = await store(await drawPicture().jpeg().toBuffer());
    for (const client of [other, moderator])
      expect((await client.send('delete', `/api/photos/${id}`)).status).toBe(404);
    expect((await visitor.send('delete', `/api/photos/${id}`)).status).toBe(401);
  });
});

describe('a check with a photo', () => {
  let bank: string;
  beforeEach(async () => {
    bank = await createBankOf(owner, { name: randomUUID() });
  });
  const submit = (photoId: string) =>
    owner.send('post', `/api/banks/${bank}/checks`, checkInput({ photoId }));
  const take = async (client = owner, of = bank) =>
    (await send(await drawPicture().jpeg().toBuffer(), 'a.jpg', client, of)).body.id as string;

  it('tells its photo to its owner and to moderators', async () => {
    const photoId = await take();
    const { status, body } = await submit(photoId);
    expect([status, body.photoId]).toEqual([201, photoId]);
    expect((await owner.get(`/api/checks/${body.id}`)).body.photoId).toBe(photoId);
    const submission = await moderator.get(`/api/screening/${body.id}`);
    expect(submission.body.fields.photoId).toBe(photoId);
  });

  it('changes it, and lets it go', async () => {
    const [first, second] = [await take(), await take()];
    const { id } = (await submit(first)).body;
    const { reading, conditions, sources, note } = checkInput();
    const edit = (photoId: string | null, version: number) =>
      owner.send('put', `/api/checks/${id}`, { reading, conditions, sources, note, photoId, version });
    const changed = await edit(second, 1);
    expect([changed.status, changed.body.photoId]).toEqual([200, second]);
    // No check has the first one any more.
    expect((await moderator.get(`/api/photos/${first}`)).status).toBe(404);
    expect((await edit(null, changed.body.version)).body.photoId).toBeNull();
  });

  it("refuses one of another's, of another bank, a log, and none at all", async () => {
    const otherBank = await createBankOf(other);
    const log = await Upload.create({
      ...{ ownerId: owner.userId!, bankId: bank, kind: 'log', filename: 'log.csv', storageKey: randomUUID() },
      ...{ sha256: 'd'.repeat(64), bytes: 1, state: 'unclear' },
    });
    const ids = [await take(other, otherBank), await take(owner, bankId), log.id, randomUUID()];
    for (const photoId of ids) {
      const { status, body } = await submit(photoId);
      expect([status, body.error.fields]).toEqual([
        422,
        { photoId: 'This photo is not there. Take it again.' },
      ]);
    }
    expect(await Check.count({ where: { bankId: bank } })).toBe(0);
  });
});

it('goes with its owner’s account, both files of it, and from the check it was sent in with', async () => {
  const leaving = await server.client('owner');
  const bank = await createBankOf(leaving);
  const { body: photo } = await send(await drawPicture().jpeg().toBuffer(), 'a.jpg', leaving, bank);
  const { storageKey, thumbKey } = await Upload.findByPk(photo.id, { rejectOnEmpty: true });
  const sent = await leaving.send('post', `/api/banks/${bank}/checks`, checkInput({ photoId: photo.id }));
  const user = await User.findByPk(leaving.userId!, { rejectOnEmpty: true });
  const keys = await server.deps.db.transaction((transaction) =>
    erasePersonalData(user, server.deps.clock(), transaction),
  );
  expect(keys.sort()).toEqual([storageKey, thumbKey].sort());
  expect((await Check.findByPk(sent.body.id))?.photoId).toBeNull();
  expect(await Upload.count({ where: { id: photo.id } })).toBe(0);
});
