import { existsSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium, type Page } from 'playwright-core';
import { build } from 'vite';
import type { Analysed } from './analysed.ts';

const flags = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  // No layer may lean on WebGL.
  '--disable-webgl',
  '--disable-3d-apis',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** Starts the system's Chromium; CHROMIUM names another one. */
export async function openBrowser(): Promise<Browser> {
  const executablePath = process.env.CHROMIUM ?? '/usr/bin/chromium';
  if (!existsSync(executablePath)) {
    throw new Error(
      `There is no browser at ${executablePath}; apt-get install chromium, or name one by CHROMIUM=path.`,
    );
  }
  return chromium.launch({ executablePath, args: flags });
}

/** The test page as one script, on the OpenLayers of the named package of node_modules. */
export async function pageScript(ol: 'ol' | 'ol7'): Promise<string> {
  const result = await build({
    configFile: false,
    logLevel: 'error',
    root: fileURLToPath(new URL('.', import.meta.url)),
    resolve: { alias: [{ find: /^ol(?=\/)/, replacement: ol }] },
    build: {
      write: false,
      minify: false,
      target: 'es2022',
      lib: {
        entry: fileURLToPath(new URL('stage-page.ts', import.meta.url)),
        formats: ['es'],
        fileName: 'page',
      },
    },
  });
  const [{ output }] = result as unknown as { output: { code: string }[] }[];
  return output[0].code;
}

/** Serves a scene and the page on a port of its own, under a strict content security policy. */
export async function serve(
  { view, ponds, pourPoints, path }: Analysed,
  script: string,
  scripts: Readonly<Record<string, string>> = {},
): Promise<{ url: string; close(): Promise<void> }> {
  const { elevationM, leaf, levelM, pondOfLeaf, ...plain } = view;
  const body = new Map<string, [string, string | Uint8Array]>([
    ['/', ['text/html', html]],
    ['/page.js', ['text/javascript', script]],
    ['/page.css', ['text/css', css]],
    ['/scene.json', ['application/json', JSON.stringify({ view: plain, ponds, pourPoints, path })]],
  ]);
  for (const [name, text] of Object.entries(scripts)) body.set(name, ['text/javascript', text]);
  for (const [name, { buffer }] of Object.entries({ elevationM, leaf, levelM, pondOfLeaf })) {
    body.set(`/${name}`, ['application/octet-stream', new Uint8Array(buffer)]);
  }
  const server = createServer((request, response) => {
    const found = body.get(new URL(request.url ?? '/', 'http://localhost').pathname);
    response.writeHead(found ? 200 : 404, {
      'content-type': found?.[0] ?? 'text/plain',
      'content-security-policy': "default-src 'self'",
    });
    response.end(found?.[1] ?? '');
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}/`,
    close: () => new Promise((done) => server.close(() => done())),
  };
}

/** A page with the stage ready on it; what it complains of fails the test. */
export async function openStage(
  browser: Browser,
  url: string,
  size: { width: number; height: number; deviceScaleFactor: number },
): Promise<Page> {
  const { deviceScaleFactor, ...viewport } = size;
  const page = await browser.newPage({ viewport, deviceScaleFactor });
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(String(error)));
  await page.goto(url);
  await page.waitForSelector('body[data-ready]', { timeout: 30_000 }).catch((error) => {
    throw new Error([String(error), ...complaints].join('\n'));
  });
  return page;
}

/** The map stands at a fraction of a pixel, as maps on real pages do. */
const html = `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>map</title>
<link rel="stylesheet" href="page.css"></head>
<body><div id="map"></div><script type="module" src="page.js"></script></body></html>`;

const css = `html, body { margin: 0; height: 100%; background: #fff; overflow: hidden; }
#map { position: absolute; left: 10.3px; top: 7.7px; right: 20.4px; bottom: 12px; }`;
