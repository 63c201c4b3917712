import { createHash, randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { s3Settings } from '@/server/config.ts';
import { diskStorage } from '@/server/files/disk-storage.ts';
import type { ByteRange, FileStorage } from '@/server/files/file-storage.ts';
import { s3Storage } from '@/server/files/s3-storage.ts';
import { scratchDir } from './built-server.ts';
import { type FakeObjectStore, startObjectStore } from './fake-object-store.ts';

// Plain JavaScript without types, as main.mjs loads it: named so that no checker looks for them.
const environment: string = '../../src/server/environment.mjs';
const { prepareEnvironment } = (await import(environment)) as {
  prepareEnvironment(env?: NodeJS.ProcessEnv): unknown;
};

const key = { accessKeyId: 'bench', secretAccessKey: 'a secret of the bench', region: 'eu-north-1' };
let store: FakeObjectStore;
beforeAll(async () => {
  store = await startObjectStore(key);
});
afterAll(() => store.stop());

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const read = async (storage: FileStorage, name: string, range?: ByteRange) => {
  const stream = await storage.open(name, range);
  return stream && Buffer.from(await new Response(stream).arrayBuffer());
};
const onS3 = (more: { secretAccessKey?: string } = {}) =>
  s3Storage({ endpoint: store.endpoint, bucket: 'releases', prefix: 'bench/', ...key, ...more });

describe.each([
  ['a folder', () => diskStorage(scratchDir())],
  ['an S3-compatible store', () => onS3()],
] as const)('%s', (_name, open) => {
  it.each([0, 1, 70_000, 3_000_000])('gives back a file of %d bytes, whole and in part', async (size) => {
    const storage = open();
    const bytes = randomBytes(size);
    const name = sha256(bytes);
    await storage.put(name, bytes);
    await storage.put(name, bytes);
    expect((await read(storage, name))!.equals(bytes)).toBe(true);
    if (size < 100) return;
    expect((await read(storage, name, { from: 10, to: 69_999 }))!.equals(bytes.subarray(10, 70_000))).toBe(true);
  });

  it('says that a file is not there', async () => {
    expect(await open().open('0'.repeat(64))).toBeUndefined();
  });

  it('takes digests alone as keys, so that no name leads out of it', async () => {
    await expect(open().put('../../etc/passwd', Buffer.of(1))).rejects.toThrow(/64 hexadecimal digits/);
    await expect(open().open(`${'0'.repeat(63)}/`)).rejects.toThrow(/64 hexadecimal digits/);
  });
});

describe('a folder', () => {
  it('keeps no half-written file and lets nobody else read one', async () => {
    const root = scratchDir();
    const bytes = randomBytes(1000);
    await diskStorage(root).put(sha256(bytes), bytes);
    const folder = join(root, sha256(bytes).slice(0, 2));
    expect(readdirSync(folder)).toEqual([sha256(bytes)]);
  });

  it('writes again what a crash cut short', async () => {
    const root = scratchDir();
    const bytes = randomBytes(1000);
    const folder = join(root, sha256(bytes).slice(0, 2));
    mkdirSync(folder, { recursive: true });
    writeFileSync(join(folder, sha256(bytes)), bytes.subarray(0, 500));
    const storage = diskStorage(root);
    await storage.put(sha256(bytes), bytes);
    expect((await read(storage, sha256(bytes)))!.equals(bytes)).toBe(true);
  });

  it('that cannot be written is a storage refusal', async () => {
    vi.spyOn(console, 'error').mockImplementation(() => {});
    const root = join(scratchDir(), 'file');
    writeFileSync(root, '');
    chmodSync(root, 0o400);
    await expect(diskStorage(root).put('1'.repeat(64), Buffer.of(1))).rejects.toMatchObject({ code: 'storage' });
    expect(existsSync(join(root, '11'))).toBe(false);
  });
});

describe('an S3-compatible store', () => {
  it('is sent signed requests whose bodies have the digest stated, under the prefix', async () => {
    store.log.length = 0;
    const bytes = randomBytes(500);
    await onS3().put(sha256(bytes), bytes);
    await read(onS3(), sha256(bytes), { from: 1, to: 3 });
    const path = `/releases/bench/${sha256(bytes).slice(0, 2)}/${sha256(bytes)}`;
    expect(store.log.map((line) => line.replace(/\?.*/, ''))).toEqual([`PUT ${path}`, `GET ${path}`]);
    expect(store.objects.get(path)!.equals(bytes)).toBe(true);
  });

  it('that refuses a wrong secret, or bytes that are not those of the digest, is a storage refusal', async () => {
    vi.spyOn(console, 'error').mockImplementation(() => {});
    const bytes = randomBytes(500);
    const wrong = onS3({ secretAccessKey: 'another secret' });
    await expect(wrong.put(sha256(bytes), bytes)).rejects.toMatchObject({ code: 'storage' });
    expect(store.log.at(-1)).toBe('PUT refused: SignatureDoesNotMatch');
    await expect(onS3().put(sha256(bytes), randomBytes(500))).rejects.toMatchObject({ code: 'storage' });
    expect(store.log.at(-1)).toBe('PUT refused: BadDigest');
    await expect(wrong.open(sha256(bytes))).rejects.toMatchObject({ code: 'storage' });
  });

  it('that is busy for a moment is tried again', async () => {
    store.fail(1);
    const bytes = randomBytes(50);
    await onS3().put(sha256(bytes), bytes);
    expect((await read(onS3(), sha256(bytes)))!.equals(bytes)).toBe(true);
  });
});

describe('the settings of the file store', () => {
  const base = () => ({ DATA_DIR: scratchDir() }) as unknown as NodeJS.ProcessEnv;
  const whole = { S3_BUCKET: 'releases', S3_ACCESS_KEY_ID: 'a', S3_SECRET_ACCESS_KEY: 'b' };

  it('are none by default, and all of them when a bucket is named', () => {
    expect(s3Settings({} as NodeJS.ProcessEnv)).toBeUndefined();
    prepareEnvironment({ ...base(), ...whole, S3_ENDPOINT: 'https://store.example.test' });
    expect(s3Settings({ ...whole, S3_PREFIX: 'bench' } as unknown as NodeJS.ProcessEnv)).toEqual({
      ...{ bucket: 'releases', prefix: 'bench/', region: 'us-east-1', accessKeyId: 'a', secretAccessKey: 'b' },
    });
  });

  it.each([
    [{ S3_ENDPOINT: 'https://store.example.test' }, /^S3_BUCKET/],
    [{ S3_BUCKET: 'releases' }, /^S3_ACCESS_KEY_ID/],
    [{ ...whole, S3_SECRET_ACCESS_KEY: '' }, /^S3_SECRET_ACCESS_KEY/],
    [{ ...whole, S3_ENDPOINT: 'http://store.example.test' }, /^S3_ENDPOINT.*https/],
    [{ ...whole, S3_BUCKET: 'No Bucket' }, /^S3_BUCKET/],
  ])('%j are refused at the start', (given, message) => {
    expect(() => prepareEnvironment({ ...base(), ...given })).toThrow(message);
  });
});
