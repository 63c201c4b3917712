import { createHash, createHmac } from 'node:crypto';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';

export interface FakeObjectStore {
  endpoint: string;
  objects: Map<string, Buffer>;
  /** Method and path of every request that was let in, and the reason of every one that was not. */
  log: string[];
  /** Answers the next so many requests with 503. */
  fail(times: number): void;
  stop(): Promise<void>;
}

interface Key {
  accessKeyId: string;
  secretAccessKey: string;
  region: string;
}

/** A small store that speaks the part of S3 we use, and is as strict as the real ones: it works out each request's
 *  Signature Version 4 for itself, from the published description, and holds each body against its stated digests. */
export async function startObjectStore(key: Key): Promise<FakeObjectStore> {
  const objects = new Map<string, Buffer>();
  const log: string[] = [];
  let failures = 0;
  const server = createServer(async (request, response) => {
    const body = Buffer.concat(await request.toArray());
    if (failures > 0) {
      failures--;
      return refuse(response, 503, 'SlowDown');
    }
    const fault = faultOf(request, body, key);
    log.push(fault ? `${request.method} refused: ${fault}` : `${request.method} ${request.url}`);
    if (fault) return refuse(response, 403, fault);
    const path = decodeURIComponent(new URL(request.url!, 'http://store').pathname);
    if (request.method === 'PUT') {
      objects.set(path, body);
      response.setHeader('ETag', `"${createHash('md5').update(body).digest('hex')}"`);
      return response.end();
    }
    const object = objects.get(path);
    return object ? give(request, response, object) : refuse(response, 404, 'NoSuchKey');
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    endpoint: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    objects,
    log,
    fail: (times) => {
      failures = times;
    },
    stop: () => new Promise((resolve) => server.close(() => resolve()) && server.closeAllConnections()),
  };
}

function give(request: IncomingMessage, response: ServerResponse, object: Buffer): void {
  const [, from, to] = /^bytes=(\d+)-(\d+)$/.exec(request.headers.range ?? '') ?? [];
  if (from === undefined) response.end(object);
  else {
    const part = object.subarray(Number(from), Number(to) + 1);
    response.writeHead(206, { 'Content-Range': `bytes ${from}-${to}/${object.length}`, 'Content-Length': part.length });
    response.end(part);
  }
}

function refuse(response: ServerResponse, status: number, code: string): void {
  response.writeHead(status, { 'Content-Type': 'application/xml' });
  response.end(`<?xml version="1.0"?><Error><Code>${code}</Code><Message>${code}</Message></Error>`);
}

const sha256 = (data: Buffer | string) => createHash('sha256').update(data).digest('hex');
const hmac = (key: Buffer | string, data: string) => createHmac('sha256', key).update(data).digest();
const encode = (text: string) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`);

/** Why the request is not let in: its signature, its time, or a body that is not the one signed. */
function faultOf(request: IncomingMessage, body: Buffer, key: Key): string | undefined {
  const header = (name: string) => String(request.headers[name] ?? '');
  const fields =
    /^AWS4-HMAC-SHA256 Credential=([^/]+)\/(\d{8})\/([^/]+)\/s3\/aws4_request, ?SignedHeaders=([^,]+), ?Signature=(\w{64})$/;
  const [, accessKeyId, day, region, signed, signature] = fields.exec(header('authorization')) ?? [];
  if (!signature) return 'AccessDenied';
  if (accessKeyId !== key.accessKeyId) return 'InvalidAccessKeyId';
  const time = header('x-amz-date');
  const at = Date.parse(time.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/, '$1-$2-$3T$4:$5:$6Z'));
  if (!time.startsWith(day!) || region !== key.region || !(Math.abs(Date.now() - at) < 15 * 60_000))
    return 'RequestTimeTooSkewed';
  const names = signed!.split(';');
  for (const name of ['host', 'x-amz-date', 'x-amz-content-sha256']) if (!names.includes(name)) return 'UnsignedHeader';
  const url = new URL(request.url!, 'http://store');
  const query = [...url.searchParams].map(([name, value]) => `${encode(name)}=${encode(value)}`).sort();
  const canonical = [
    request.method,
    url.pathname,
    query.join('&'),
    ...names.map((name) => `${name}:${header(name).trim().replace(/\s+/g, ' ')}`),
    '',
    signed,
    header('x-amz-content-sha256'),
  ].join('\n');
  const scope = `${day}/${region}/s3/aws4_request`;
  const toSign = ['AWS4-HMAC-SHA256', time, scope, sha256(canonical)].join('\n');
  const signingKey = ['s3', 'aws4_request'].reduce(
    (secret, part) => hmac(secret, part),
    hmac(hmac(`AWS4${key.secretAccessKey}`, day!), region!),
  );
  if (createHmac('sha256', signingKey).update(toSign).digest('hex') !== signature) return 'SignatureDoesNotMatch';
  if (header('x-amz-content-sha256') !== sha256(body)) return 'XAmzContentSHA256Mismatch';
  if (request.method !== 'PUT') return undefined;
  const checksum = createHash('sha256').update(body).digest('base64');
  return header('x-amz-checksum-sha256') === checksum ? undefined : 'BadDigest';
}
