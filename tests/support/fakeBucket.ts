import { once } from 'node:events';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';

/** A store in memory that speaks the part of the S3 protocol that is used, over HTTP. */
export interface FakeBucket {
  endpoint: string;
  /** What is stored, by key. */
  objects: Map<string, Buffer>;
  /** What was asked, as "METHOD /path?query". */
  requests: string[];
  /** How many keys a listing gives at once. */
  pageSize: number;
  /** Answers everything with this status from now on; null = works. */
  failWith: number | null;
  stop: () => Promise<void>;
}

export const fakeBucketName = 'ebb-files';
export const fakeRegion = 'north-sea-1';
export const fakeCredentials = { AWS_ACCESS_KEY_ID: 'fakekey', AWS_SECRET_ACCESS_KEY: 'fakesecret' };

export async function startFakeBucket(): Promise<FakeBucket> {
  const server = createServer((request, response) => {
    answer(bucket, request, response).catch(() => response.writeHead(500).end());
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  const bucket: FakeBucket = {
    endpoint: `http://127.0.0.1:${port}`,
    objects: new Map(),
    requests: [],
    pageSize: 1000,
    failWith: null,
    async stop() {
      server.closeAllConnections();
      server.close();
      await once(server, 'close');
    },
  };
  return bucket;
}

async function answer(bucket: FakeBucket, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const { method = '', url = '/' } = request;
  bucket.requests.push(`${method} ${url}`);
  const content = await bodyOf(request);
  if (bucket.failWith !== null) return fail(response, bucket.failWith, 'SlowDown');
  if (!isSigned(request)) return fail(response, 403, 'AccessDenied');
  const { pathname, searchParams } = new URL(url, bucket.endpoint);
  const [, name, ...rest] = pathname.split('/');
  const key = rest.join('/');
  if (name !== fakeBucketName) return fail(response, 404, 'NoSuchBucket');
  if (method === 'GET' && key === '') return list(bucket, searchParams, response);
  if (method === 'PUT' && key !== '') return put(bucket, key, content, request, response);
  if (method === 'GET') return get(bucket.objects.get(key), request, response);
  if (method === 'DELETE' && key !== '') {
    bucket.objects.delete(key);
    response.writeHead(204).end();
    return;
  }
  fail(response, 405, 'MethodNotAllowed');
}

async function bodyOf(request: IncomingMessage): Promise<Buffer> {
  const pieces: Buffer[] = [];
  for await (const piece of request as AsyncIterable<Buffer>) pieces.push(piece);
  return Buffer.concat(pieces);
}

/** By the right key, for the right region and service; the signature itself is the client's affair. */
const isSigned = ({ headers }: IncomingMessage) =>
  new RegExp(
    `^AWS4-HMAC-SHA256 Credential=${fakeCredentials.AWS_ACCESS_KEY_ID}/\\d{8}/${fakeRegion}/s3/aws4_request, `,
  ).test(headers.authorization ?? '');

function fail(response: ServerResponse, status: number, code: string): void {
  response.writeHead(status, { 'content-type': 'application/xml' });
  response.end(`<?xml version="1.0"?><Error><Code>${code}</Code><Message>${code}</Message></Error>`);
}

/** Stores bytes as they come; a store like that would keep the frame of a framed body as part of the file. */
function put(
  { objects }: FakeBucket,
  key: string,
  content: Buffer,
  { headers }: IncomingMessage,
  response: ServerResponse,
): void {
  if (Number(headers['content-length']) !== content.length)
    return fail(response, 411, 'MissingContentLength');
  objects.set(key, content);
  response.writeHead(200, { etag: '"0"' }).end();
}

function get(content: Buffer | undefined, { headers }: IncomingMessage, response: ServerResponse): void {
  if (!content) return fail(response, 404, 'NoSuchKey');
  const end = /^bytes=0-(\d+)$/.exec(headers.range ?? '')?.[1];
  const wanted = end === undefined ? content : content.subarray(0, Number(end) + 1);
  response.writeHead(end === undefined ? 200 : 206, { 'content-length': wanted.length }).end(wanted);
}

function list({ objects, pageSize }: FakeBucket, query: URLSearchParams, response: ServerResponse): void {
  if (query.get('list-type') !== '2') return fail(response, 400, 'InvalidArgument');
  const prefix = query.get('prefix') ?? '';
  const keys = [...objects.keys()].filter((key) => key.startsWith(prefix)).sort();
  const from = Number(query.get('continuation-token') ?? 0);
  const page = keys.slice(from, from + pageSize);
  const next = from + page.length < keys.length ? from + page.length : null;
  const contents = page.map((key) => `<Contents><Key>${key}</Key></Contents>`).join('');
  const token = next === null ? '' : `<NextContinuationToken>${next}</NextContinuationToken>`;
  response.writeHead(200, { 'content-type': 'application/xml' });
  response.end(
    `<?xml version="1.0"?><ListBucketResult><IsTruncated>${next !== null}</IsTruncated>${contents}${token}</ListBucketResult>`,
  );
}
