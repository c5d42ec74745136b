import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { deflateRawSync, gzipSync } from 'node:zlib';

import iconv from 'iconv-lite';

import { createBankOf, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import { hugePng } from '../support/pictures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  bankId = await createBankOf(owner);
});
afterAll(() => server.stop());

const send = (kind: 'logs' | 'photos', content: Buffer, filename: string) =>
  owner.send('post', `/api/banks/${bankId}/${kind}`).attach('file', content, filename);

const zipHead = Buffer.from('504b0304140000000800', 'hex');
/** 50 MB of nothing in some 50 kB. */
const zipBomb = Buffer.concat([zipHead, deflateRawSync(Buffer.alloc(5e7))]);
const gzipBomb = gzipSync(Buffer.alloc(5e7));
const elf = Buffer.from('7f454c46020101000000000000000000', 'hex');
const windowsProgram = Buffer.concat([Buffer.from('4d5a9000030000000400', 'hex'), Buffer.alloc(200)]);
const script = Buffer.from('#!/bin/sh\nrm -rf /\n');

interface Refused {
  what: string;
  kind: 'logs' | 'photos';
  filename: string;
  content: () => Buffer;
  status: number;
  /** What stands beside the field. */
  says: RegExp;
}

/** Files that are not taken at all: the answer comes with the upload. */
const refused: Refused[] = [
  {
    what: 'a picture as a log',
    kind: 'logs',
    filename: 'log.png',
    content: () => hugePng(8, 8),
    status: 415,
    says: /not text/,
  },
  {
    what: 'a spreadsheet as a log',
    kind: 'logs',
    filename: 'log.xlsx',
    content: () => zipHead,
    status: 415,
    says: /CSV/,
  },
  {
    what: 'a text as a photo',
    kind: 'photos',
    filename: 'notes.txt',
    content: () => Buffer.from('words'),
    status: 415,
    says: /not a picture/,
  },
  {
    what: 'a program called csv',
    kind: 'logs',
    filename: 'log.csv',
    content: () => elf,
    status: 415,
    says: /not text/,
  },
  {
    what: 'another program called csv',
    kind: 'logs',
    filename: 'log.csv',
    content: () => windowsProgram,
    status: 415,
    says: /not text/,
  },
  {
    what: 'a program called jpg',
    kind: 'photos',
    filename: 'meter.jpg',
    content: () => elf,
    status: 415,
    says: /not a picture/,
  },
  {
    what: 'a script called jpg',
    kind: 'photos',
    filename: 'meter.jpg',
    content: () => script,
    status: 415,
    says: /not a picture/,
  },
  {
    what: 'a picture of 100 megapixels',
    kind: 'photos',
    filename: 'meter.png',
    content: () => hugePng(10_000, 10_000),
    status: 413,
    says: /100 megapixels; at most 50/,
  },
  {
    what: 'a zip bomb called csv',
    kind: 'logs',
    filename: 'log.csv',
    content: () => zipBomb,
    status: 415,
    says: /CSV/,
  },
  {
    what: 'a gzip bomb called csv',
    kind: 'logs',
    filename: 'log.csv',
    content: () => gzipBomb,
    status: 415,
    says: /compressed/,
  },
  {
    what: 'a zip bomb called png',
    kind: 'photos',
    filename: 'meter.png',
    content: () => zipBomb,
    status: 415,
    says: /not a picture/,
  },
];

it.each(refused)(
  'refuses $what in words, and keeps nothing',
  async ({ kind, filename, content, status, says }) => {
    const folders = () =>
      ['files', 'tmp'].map((folder) => {
        const path = join(server.deps.config.uploadsDir, folder);
        return readdirSync(join(path, '..')).includes(folder) ? readdirSync(path).length : 0;
      });
    const before = folders();
    const answer = await send(kind, content(), filename);
    expect(answer.status).toBe(status);
    expect(answer.body.error.fields.file).toMatch(says);
    expect(folders()).toEqual(before);
  },
);

const { text, capacityAh } = dischargeLog();
const lines = text.trim().split('\n');
const rows = lines.slice(1);
const logOf = (body: readonly string[]) => `${[lines[0], ...body].join('\n')}\n`;
const timeOf = (row: string) => Number(row.split(',')[0]);
const at = (row: string, seconds: number) => [seconds, ...row.split(',').slice(1)].join(',');

/** The discharge, an idle hour, and the charge that put it back in: the sign of the current turns. */
function withCharge(): string {
  const lastS = timeOf(rows.at(-1)!);
  const charge = rows.map((row, index) => {
    const [, , amps, degrees] = row.split(',');
    // Under charge the voltage climbs back the way it fell.
    const volts = rows.at(-1 - index)!.split(',')[1];
    return [lastS + 3600 + index * 20, volts, amps === '-56' ? '56' : '0', degrees].join(',');
  });
  return logOf([...rows, ...charge]);
}

/** Half an hour without rows in the middle of the discharge. */
const withGap = () => logOf(rows.filter((row) => timeOf(row) < 8000 || timeOf(row) >= 9800));

interface Read {
  what: string;
  content: () => string | Buffer;
  state: 'ready' | 'unclear' | 'failed';
  /** Codes of what was noticed, or what the problem says. */
  says: string[] | RegExp;
  /** Ah; as the log's maker has it, unless it is not told. */
  isWhole?: boolean;
}

/** Files that are text, and are told about once they have been read. */
const read: Read[] = [
  {
    what: 'formulas in cells and in the header',
    content: () => {
      const hostile = [...rows];
      hostile.splice(300, 0, `=cmd|' /C calc'!A0,=1+1,@SUM(A1),+2`);
      return logOf(hostile).replace('temperature (°C)', '=HYPERLINK("http://x")');
    },
    state: 'ready',
    says: ['rowsSkipped'],
    isWhole: true,
  },
  {
    what: 'bytes that are no letters in any encoding',
    content: () =>
      Buffer.concat([
        Buffer.from(text.slice(0, 400)),
        Buffer.from([0xff, 0xfe, 0xc3, 0x28]),
        Buffer.from(text.slice(400)),
      ]),
    state: 'ready',
    says: [],
    isWhole: true,
  },
  {
    what: 'UTF-16 without a mark',
    content: () => iconv.encode(text, 'utf-16le'),
    state: 'ready',
    says: [],
    isWhole: true,
  },
  {
    what: 'what was UTF-16 and lost half of it',
    content: () =>
      Buffer.from(iconv.encode(text, 'utf-16le').toString('utf8').replaceAll('\u0000', '\ufffd')),
    state: 'failed',
    says: /encoding|table/i,
  },
  {
    what: 'a discharge and a charge',
    content: withCharge,
    state: 'ready',
    says: ['chargeLeftOut'],
    isWhole: true,
  },
  {
    what: 'stamps that run backwards from the end to the start',
    content: () => logOf([...rows].reverse()),
    state: 'ready',
    says: ['newestFirst'],
    isWhole: true,
  },
  {
    what: 'stamps that fall back in the middle',
    content: () => logOf(rows.map((row, index) => (index === 400 ? at(row, timeOf(row) - 100) : row))),
    state: 'ready',
    says: ['outOfOrder'],
  },
  { what: 'a gap in the middle', content: withGap, state: 'ready', says: ['gapHoldsCharge'], isWhole: true },
  {
    what: 'a log under no load',
    content: () => logOf(rows.map((row) => row.replace(',-56,', ',0,'))),
    state: 'failed',
    says: /zero all through/,
  },
  {
    what: 'prose',
    content: () => 'Dear all,\nthe log follows tomorrow.\nRegards\n',
    state: 'failed',
    says: /table|log/i,
  },
];

it.each(read)('reads $what, and says what it found', async ({ content, state, says, isWhole }) => {
  const sent = await send('logs', Buffer.from(content()), 'log.csv');
  expect(sent.status).toBe(201);
  await server.deps.jobs.settle();
  const upload = (await owner.get(`/api/uploads/${sent.body.id}`)).body;
  expect(upload.state).toBe(state);
  if (says instanceof RegExp) {
    expect(upload.problem).toMatch(says);
    expect(upload.result).toBeNull();
    return;
  }
  const noticed = upload.result.warnings.map(({ code }: { code: string }) => code);
  expect(noticed).toEqual(expect.arrayContaining(says));
  // The charge of the log as it was made (see its maker), whatever was done to it on the way.
  if (isWhole) expect(upload.result.capacityAh).toBeCloseTo(capacityAh, 0);
});
