import { readdirSync } from 'node:fs';
import { join } from 'node:path';

import sharp from 'sharp';

import { Upload } from '@/server/db/models';

import { createBankOf, createCellType } from '../support/bankFixtures';
import { drawPicture, hugePng } from '../support/pictures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  bankId = await createBankOf(owner);
  // So that the folders are there.
  await send(await drawn());
});
afterAll(() => server.stop());

const send = (content: Buffer, filename = 'meter.jpg') =>
  owner.send('post', `/api/banks/${bankId}/photos`).attach('file', content, filename);

const filesIn = (folder: string) => readdirSync(join(server.deps.config.uploadsDir, folder));

const svg = '<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>';
const heic = Buffer.concat([
  Buffer.from([0, 0, 0, 24]),
  Buffer.from('ftypheic\0\0\0\0mif1heic'),
  Buffer.alloc(500),
]);
const drawn = (seed = 1) => drawPicture(640, 480, seed).jpeg().toBuffer();
const gif = async () =>
  sharp([await drawn(1), await drawn(2)], { join: { animated: true } })
    .gif()
    .toBuffer();
const polyglot = Buffer.concat([Buffer.from('\xff\xd8\xff\xe0', 'latin1'), Buffer.from(svg)]);

/** Further ones beside those of badUploads.test.ts. */
it.each<[string, string, () => Buffer | Promise<Buffer>, number, string, RegExp]>([
  ['an SVG with a script', 'meter.svg', () => Buffer.from(svg), 415, 'unsupportedType', /not a picture/],
  [
    'an SVG with a script called png',
    'meter.png',
    () => Buffer.from(svg),
    415,
    'unsupportedType',
    /not a picture/,
  ],
  ['an SVG behind the first bytes of a JPEG', 'meter.jpg', () => polyglot, 422, 'invalid', /damaged/],
  ['an animated GIF', 'meter.gif', gif, 415, 'unsupportedType', /JPEG, PNG or WebP/],
  ['a HEIC that cannot be read', 'meter.heic', () => heic, 415, 'unsupportedType', /HEIC/],
  [
    'a bomb of 4,000 megapixels',
    'meter.png',
    () => hugePng(250_000, 16_000),
    413,
    'tooLarge',
    /4000 megapixels/,
  ],
  [
    'a JPEG that is cut',
    'meter.jpg',
    async () => (await drawn()).subarray(0, 4000),
    422,
    'invalid',
    /damaged/,
  ],
  [
    'a JPEG with only its head',
    'meter.jpg',
    async () => (await drawn()).subarray(0, 20),
    422,
    'invalid',
    /damaged/,
  ],
  ['an empty file', 'meter.jpg', () => Buffer.alloc(0), 422, 'invalid', /empty/],
  [
    '20 MB and a byte',
    'meter.jpg',
    () => Buffer.alloc(20 * 1024 * 1024 + 1, 1),
    413,
    'tooLarge',
    /larger than 20 MB/,
  ],
])(
  'refuses %s beside the file and keeps nothing',
  async (_what, filename, make, wanted, code, words) => {
    const [rows, files] = [await Upload.count(), filesIn('files').length];
    const { status, body } = await send(await make(), filename);
    expect([status, body.error.code]).toEqual([wanted, code]);
    expect(body.error.fields.file).toMatch(words);
    expect(await Upload.count()).toBe(rows);
    expect(filesIn('files')).toHaveLength(files);
    expect(filesIn('tmp')).toEqual([]);
  },
  30_000,
);
