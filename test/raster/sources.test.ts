import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, test } from 'vitest';
import { fileSource } from '../../src/node/file-source.ts';
import { blobSource } from '../../src/raster/blob-source.ts';
import { openTerrain } from '../../src/raster/open-terrain.ts';
import { type UrlOptions, urlSource } from '../../src/raster/url-source.ts';
import { opened, ramp, refusal } from './open.ts';
import { type TiffSpec, tiffBytes } from './tiff-builder.ts';

const spec: TiffSpec = { width: 300, height: 200, values: ramp(300, 200), tile: [64, 64] };
const bytes = tiffBytes(spec);

describe('files and Blobs', () => {
  test('give the same terrain and the same hash', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'terrain-'));
    try {
      await writeFile(join(folder, 'hill.tif'), bytes);
      const fromMemory = await opened([bytes]);
      const fromFile = await openTerrain([await fileSource(join(folder, 'hill.tif'))]);
      const fromBlob = await openTerrain([
        blobSource(new Blob([bytes as Uint8Array<ArrayBuffer>]), 'hill.tif'),
      ]);
      expect(fromFile.sha256).toBe(fromMemory.sha256);
      expect(fromBlob.sha256).toBe(fromMemory.sha256);
      expect(fromFile.files).toEqual(fromBlob.files);
      expect(fromFile.files[0]).toMatchObject({ name: 'hill.tif', hashOf: 'file' });
      expect(await refusal(fileSource(folder))).toBe(
        `unreadable: ${folder} is not a file; give the path of an elevation file.`,
      );
      expect(await refusal(fileSource(join(folder, 'none.tif')))).toBe(
        `unreadable: ${join(folder, 'none.tif')} does not exist; check the path.`,
      );
    } finally {
      await rm(folder, { recursive: true });
    }
  });
});

describe('URLs', () => {
  const servers: Server[] = [];
  afterEach(() => {
    for (const server of servers.splice(0)) {
      server.closeAllConnections();
      server.close();
    }
  });

  async function serve(answer: RequestListener): Promise<string> {
    const server = createServer(answer);
    servers.push(server);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    return `http://127.0.0.1:${(server.address() as AddressInfo).port}/tiles/hill.tif?key=1`;
  }

  const ranges =
    (data: Uint8Array, asked: string[] = [], etag: () => string = () => '"1"'): RequestListener =>
    (request, response) => {
      asked.push(request.headers.range ?? 'none');
      const [, from, to] = /^bytes=(\d+)-(\d+)$/.exec(request.headers.range ?? '') ?? [];
      const start = Number(from);
      if (start >= data.length) {
        response.writeHead(416, { 'content-range': `bytes */${data.length}` }).end();
        return;
      }
      const end = Math.min(Number(to), data.length - 1);
      response
        .writeHead(206, { 'content-range': `bytes ${start}-${end}/${data.length}`, etag: etag() })
        .end(data.subarray(start, end + 1));
    };

  const open = (url: string, options?: UrlOptions) => openTerrain([urlSource(url, options)]);
  const failing = (url: string, options?: UrlOptions) => refusal(open(url, options));

  test('byte ranges: the same terrain and hash as from memory', async () => {
    const asked: string[] = [];
    const terrain = await open(await serve(ranges(bytes, asked)));
    const local = await opened([bytes]);
    expect(terrain.sha256).toBe(local.sha256);
    expect(terrain.files).toEqual([{ ...local.files[0], name: 'hill.tif' }]);
    expect(asked.every((range) => range.startsWith('bytes='))).toBe(true);
  });

  test('byte ranges: a window asks for little, and its hash is that of the same window on disk', async () => {
    const large = tiffBytes({ ...spec, width: 512, height: 512, values: ramp(512, 512) });
    const asked: string[] = [];
    const window = { column: 70, row: 70, width: 20, height: 20 };
    const terrain = await openTerrain([urlSource(await serve(ranges(large, asked)))], { window });
    const local = await opened([large], { window });
    expect(terrain.files[0].sha256).toBe(local.files[0].sha256);
    expect(terrain.files[0].hashOf).toBe('ranges');
    expect(asked.length).toBeLessThanOrEqual(4);
  });

  test('a server without byte ranges is read once, whole', async () => {
    let requests = 0;
    const url = await serve((_, response) => {
      requests++;
      response.writeHead(200).end(bytes);
    });
    expect((await open(url)).sha256).toBe((await opened([bytes])).sha256);
    expect(requests).toBe(1);
  });

  test('a server without byte ranges and a file above the limit, with and without its length told', async () => {
    const told = await serve((_, response) => {
      response.writeHead(200, { 'content-length': bytes.length }).end(bytes);
    });
    expect(await failing(told, { wholeBytes: 1000 })).toBe(
      `too-large: The server of ${told} offers no byte ranges and the file has ${bytes.length} bytes; at most 1000 are taken whole, so download the file and open it from disk.`,
    );
    const untold = await serve((_, response) => {
      response.writeHead(200);
      response.write(bytes.subarray(0, 5000));
      response.end(bytes.subarray(5000));
    });
    expect(await failing(untold, { wholeBytes: 1000 })).toBe(
      `too-large: The server of ${untold} offers no byte ranges and the file has more than 1000 bytes; at most 1000 are taken whole, so download the file and open it from disk.`,
    );
  });

  test.each([
    [401, 'is forbidden (status 401); ask its owner for access or download the file first.'],
    [403, 'is forbidden (status 403); ask its owner for access or download the file first.'],
    [404, 'does not exist (status 404); check the address.'],
    [500, 'failed with status 500; expected 206 (a byte range), so try again later.'],
  ])('status %i', async (status, sentence) => {
    const url = await serve((_, response) => response.writeHead(status).end('no'));
    expect(await failing(url)).toBe(`unreadable: ${url} ${sentence}`);
  });

  test('nobody there', async () => {
    const url = await serve(() => {});
    await new Promise((resolve) => servers[0].close(resolve));
    expect(await failing(url)).toBe(
      `unreadable: ${url} could not be reached; check the address and the connection, or, when a page reads it, that the server allows other sites (CORS).`,
    );
  });

  test('no answer in time, and an answer that never ends', async () => {
    const silent = await serve(() => {});
    const sentence = 'did not answer within 0.2 s; try again or download the file first.';
    expect(await failing(silent, { timeoutMs: 200 })).toBe(`unreadable: ${silent} ${sentence}`);
    const endless = await serve((_, response) => {
      response.writeHead(206, { 'content-range': `bytes 0-65535/${bytes.length}` });
      response.write(bytes.subarray(0, 100));
    });
    expect(await failing(endless, { timeoutMs: 200 })).toBe(`unreadable: ${endless} ${sentence}`);
  });

  test('cancelled while waiting', async () => {
    const url = await serve(() => {});
    const stop = new AbortController();
    setTimeout(() => stop.abort(), 50);
    expect(await refusal(openTerrain([urlSource(url)], { signal: stop.signal }))).toBe(
      'cancelled: Reading the terrain was cancelled; nothing was kept.',
    );
  });

  test('a file that changes while it is read', async () => {
    const asked: string[] = [];
    const url = await serve(ranges(bytes, asked, () => `"${asked.length}"`));
    expect(await failing(url)).toBe(
      `unreadable: ${url} changed on the server while it was read; open it again.`,
    );
  });

  test('a file that ends early', async () => {
    const url = await serve(ranges(bytes.subarray(0, 200)));
    expect(await failing(url)).toMatch(
      /^unreadable: hill\.tif has 200 bytes, but a directory should be 2 bytes from byte \d+ on; /,
    );
  });

  test('a server that hides the length: read all the same, and an early end is still seen', async () => {
    const hiding =
      (data: Uint8Array): RequestListener =>
      (request, response) => {
        const [, from, to] = /^bytes=(\d+)-(\d+)$/.exec(request.headers.range ?? '') ?? [];
        response.writeHead(206).end(data.subarray(Number(from), Number(to) + 1));
      };
    const terrain = await open(await serve(hiding(bytes)));
    expect(terrain.sha256).toBe((await opened([bytes])).sha256);
    expect(terrain.files[0].hashOf).toBe('ranges');
    const url = await serve(hiding(bytes.subarray(0, bytes.length - 10)));
    expect(await failing(url)).toMatch(
      /^unreadable: hill\.tif has fewer bytes, but a directory of 15 entries should be 184 bytes from byte \d+ on; /,
    );
  });
});
