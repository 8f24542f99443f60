import { existsSync, readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { extname, join, resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');

const types: Readonly<Record<string, string>> = {
  '.js': 'text/javascript',
  '.json': 'application/json',
  '.tif': 'image/tiff',
};

/** A server of one page, and of built files, OpenLayers and fixtures beside it. */
export interface Served {
  readonly url: string;
  close(): Promise<void>;
}

export interface Serving {
  /** What the page's head holds. */
  readonly head: string;
  /** Content security policy of everything served. */
  readonly policy?: string;
  /** Lets pages of other origins read the answers. */
  readonly open?: boolean;
}

/** Serves a page at `/`, and `/dist/`, `/node_modules/`, `/test/data/` and `/demo/town/` of the repository. */
export async function served({ head, policy, open = false }: Serving): Promise<Served> {
  const page = `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>page</title>${head}</head><body></body></html>`;
  const server = createServer((request, response) => {
    const { pathname } = new URL(request.url ?? '/', 'http://localhost');
    const path = join(root, pathname);
    const isFile = /^\/(dist|node_modules|test\/data|demo\/town)\//.test(pathname) && existsSync(path);
    const found = pathname === '/' || isFile;
    response.writeHead(found ? 200 : 404, {
      'content-type': pathname === '/' ? 'text/html' : (types[extname(path)] ?? 'text/plain'),
      ...(policy === undefined ? {} : { 'content-security-policy': policy }),
      ...(open ? { 'access-control-allow-origin': '*' } : {}),
    });
    response.end(pathname === '/' ? page : found ? readFileSync(path) : '');
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    close: () =>
      new Promise((done) => {
        server.closeAllConnections();
        server.close(() => done());
      }),
  };
}
