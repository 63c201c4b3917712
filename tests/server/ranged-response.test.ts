import { describe, expect, it } from 'vitest';
import { rangedResponse } from '@/server/http/ranged-response.ts';

const bytes = Uint8Array.from({ length: 100 }, (_, i) => i);
const sha256 = 'ab'.repeat(32);
const tag = `"${sha256}"`;

async function ask(headers: Record<string, string> = {}, method = 'GET', size = 100) {
  const response = await rangedResponse(new Request('http://bench.test/', { method, headers }), {
    sizeBytes: size,
    sha256,
    fileName: 'x.zip',
    mediaType: 'application/zip',
    open: async (range) =>
      new Response(bytes.slice(range?.from ?? 0, range ? range.to + 1 : size)).body as ReadableStream<Uint8Array>,
  });
  return { response, status: response.status, got: [...new Uint8Array(await response.arrayBuffer())] };
}

describe('a released file over HTTP', () => {
  it('comes whole, with its digest as tag, and is not to be transformed', async () => {
    const { response, status, got } = await ask();
    expect([status, got]).toEqual([200, [...bytes]]);
    expect(response.headers.get('etag')).toBe(tag);
    expect(response.headers.get('accept-ranges')).toBe('bytes');
    expect(response.headers.get('content-length')).toBe('100');
    expect(response.headers.get('cache-control')).toContain('no-transform');
  });

  it.each([
    ['bytes=0-0', 0, 0],
    ['bytes=10-19', 10, 19],
    ['bytes=90-', 90, 99],
    ['bytes=90-5000', 90, 99],
    ['bytes=-7', 93, 99],
    ['bytes=-5000', 0, 99],
    ['Bytes = 3 - 4', 3, 4],
  ])('in the range %s has bytes %d to %d', async (range, from, to) => {
    const { response, status, got } = await ask({ range });
    expect(status).toBe(206);
    expect(got).toEqual([...bytes.slice(from, to + 1)]);
    expect(response.headers.get('content-range')).toBe(`bytes ${from}-${to}/100`);
    expect(response.headers.get('content-length')).toBe(String(to - from + 1));
  });

  it.each(['bytes=100-', 'bytes=500-600', 'bytes=-0'])('has nothing in the range %s', async (range) => {
    const { response, status, got } = await ask({ range });
    expect([status, got]).toEqual([416, []]);
    expect(response.headers.get('content-range')).toBe('bytes */100');
  });

  it.each(['bytes=5-3', 'bytes=a-b', 'lines=1-2', 'bytes=-', 'bytes=1-2,4-5', ''])(
    'comes whole where the range %j cannot be read or is several',
    async (range) => {
      const { status, got } = await ask({ range });
      expect([status, got.length]).toEqual([200, 100]);
    },
  );

  it('that is empty has no range', async () => {
    expect((await ask({ range: 'bytes=0-' }, 'GET', 0)).status).toBe(416);
    expect((await ask({}, 'GET', 0)).got).toEqual([]);
  });

  it.each([tag, `W/${tag}`, `"x", ${tag}`, '*'])('is not sent again to who has %s', async (have) => {
    const { status, got, response } = await ask({ 'if-none-match': have, range: 'bytes=0-5' });
    expect([status, got]).toEqual([304, []]);
    expect(response.headers.get('etag')).toBe(tag);
  });

  it('comes in a range to who has its beginning, and whole to who has another’s', async () => {
    expect((await ask({ range: 'bytes=5-9', 'if-range': tag })).status).toBe(206);
    for (const other of ['"x"', `W/${tag}`, 'Tue, 01 Dec 2026 00:00:00 GMT']) {
      expect((await ask({ range: 'bytes=5-9', 'if-range': other })).status).toBe(200);
    }
  });

  it('tells its size to HEAD without its bytes', async () => {
    const { response, status, got } = await ask({}, 'HEAD');
    expect([status, got, response.headers.get('content-length')]).toEqual([200, [], '100']);
  });
});
