import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import type { Browser, Page } from 'playwright-core';
import { build } from 'vite';
import { epsgFiles } from '../../../src/node/epsg-files.ts';

const here = (file: string): string => fileURLToPath(new URL(file, import.meta.url));

/** The package names the files of dist that act when they are imported; here the sources do. */
const definingModules = {
  name: 'defining-modules',
  transform: (code: string, id: string) =>
    id.includes('/src/elements/') ? { code, map: null, moduleSideEffects: true } : null,
};

/** A script on the OpenLayers of the named package of node_modules. */
async function script(entry: URL, format: 'es' | 'iife', ol = 'ol'): Promise<string> {
  const result = await build({
    configFile: false,
    logLevel: 'error',
    root: here('.'),
    resolve: { alias: [{ find: /^ol(?=\/)/, replacement: ol }] },
    plugins: [definingModules],
    build: {
      write: false,
      minify: false,
      target: 'es2022',
      lib: { entry: fileURLToPath(entry), formats: [format], fileName: 'page', name: 'page' },
      rolldownOptions: { output: { codeSplitting: false } },
    },
  });
  const [{ output }] = result as unknown as { output: { code: string }[] }[];
  return output[0].code;
}

/** What a test serves beside page and engine. */
export type Served = Readonly<Record<string, string | Uint8Array>>;

export interface Stage {
  readonly url: string;
  close(): Promise<void>;
}

/** Serves the elements with the engine as its own file, under a strict content security policy. */
export async function serveStage(body: string, files: Served = {}, ol = 'ol'): Promise<Stage> {
  const [page, worker] = await Promise.all([
    script(new URL('stage-page.ts', import.meta.url), 'es', ol),
    script(new URL('../../../src/engine/worker.ts', import.meta.url), 'iife'),
  ]);
  const served = new Map<string, string | Uint8Array>([
    ['/', html(body)],
    ['/page.js', page],
    ['/overbrim-worker.js', worker],
    ['/overbrim-epsg.json', JSON.stringify(await register())],
    ['/page.css', pageLook],
    ['/icon.svg', '<svg xmlns="http://www.w3.org/2000/svg"/>'],
    ['/town.tif', readFileSync(here('../../../demo/town/elevation.tif'))],
    ...Object.entries(files),
  ]);
  const server = createServer((request, response) => {
    const path = new URL(request.url ?? '/', 'http://localhost').pathname;
    const found = served.get(path);
    response.writeHead(found === undefined ? 404 : 200, {
      'content-type': types[path.split('.').pop() ?? ''] ?? 'text/html; charset=utf-8',
      'content-security-policy': "default-src 'self'",
    });
    response.end(found ?? '');
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}/`,
    close: () => new Promise((done) => server.close(() => done())),
  };
}

/** The codes that the test files use. */
async function register(): Promise<Record<string, unknown>> {
  const codes = [32710, 3855, 32725, 4326];
  return Object.fromEntries(await Promise.all(codes.map(async (code) => [code, await epsgFiles(code)])));
}

const types: Readonly<Record<string, string>> = {
  js: 'text/javascript',
  css: 'text/css',
  json: 'application/json',
  tif: 'image/tiff',
  svg: 'image/svg+xml',
};

/** A page that keeps what it complains of. */
export async function openPage(
  browser: Browser,
  url: string,
  options: NonNullable<Parameters<Browser['newPage']>[0]> = {},
): Promise<{ page: Page; complaints: string[] }> {
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, ...options });
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(String(error)));
  page.on('console', (message) => {
    if (message.type() === 'error') complaints.push(message.text());
  });
  await page.goto(url);
  return { page, complaints };
}

const html = (body: string): string => `<!doctype html>
<html lang="en">
  <head>
    <meta charset="utf-8">
    <meta name="viewport" content="width=device-width, initial-scale=1">
    <meta name="color-scheme" content="light dark">
    <title>Elements on a stage</title>
    <link rel="icon" href="icon.svg">
    <link rel="stylesheet" href="page.css">
    <script type="module" src="page.js"></script>
  </head>
  <body>${body}</body>
</html>`;

const pageLook = `
html { font-family: system-ui, sans-serif; }
body { margin: 0; display: grid; grid-template-columns: 1fr 24rem; min-height: 100vh; }
#map { position: sticky; top: 0; height: 100vh; }
brim-host > * + * { margin-top: 1rem; }
main { padding: 1rem; }
@media (max-width: 700px) { body { display: block; } #map { position: static; height: 60vh; } }
`;
