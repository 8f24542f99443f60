import { execFileSync } from 'node:child_process';
import { accessSync, constants, existsSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { type Browser, chromium } from 'playwright-core';

const commands = ['chromium', 'chromium-browser', 'google-chrome-stable', 'google-chrome'];

/** Chromium at its usual places outside the search path. */
const places = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
];

/** Shared memory is scarce in containers; nothing is fetched that the test did not ask for. */
const flags = [
  '--disable-dev-shm-usage',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/**
 * The Chromium that tests run: the one that OVERBRIM_CHROMIUM names, the system's, the browser driver's own; on Debian
 * as root the package is installed.
 * @throws Error that says in one line how to get one.
 */
export function chromiumPath(): string {
  const named = process.env.OVERBRIM_CHROMIUM;
  if (named !== undefined && named !== '') {
    if (isProgram(named)) return named;
    throw new Error(
      `OVERBRIM_CHROMIUM names ${named}, which is no program; set it to a Chromium or leave it out.`,
    );
  }
  const found = systemChromium() ?? (isProgram(chromium.executablePath()) ? chromium.executablePath() : null);
  if (found !== null) return found;
  if (existsSync('/etc/debian_version') && process.getuid?.() === 0) {
    installDebianPackages();
    const installed = systemChromium();
    if (installed !== null) return installed;
  }
  throw new Error(
    'No Chromium was found: install one (Debian: apt-get install chromium; anywhere: npx playwright-core install chromium) or name it in OVERBRIM_CHROMIUM.',
  );
}

/** A browser without a window; close it after use. */
export function launchChromium(args: readonly string[] = []): Promise<Browser> {
  // Root has no sandbox to put it in.
  const asRoot = process.getuid?.() === 0 ? ['--no-sandbox'] : [];
  return chromium.launch({ executablePath: chromiumPath(), args: [...asRoot, ...flags, ...args] });
}

function systemChromium(): string | null {
  const folders = (process.env.PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  const candidates = [
    ...commands.flatMap((command) => folders.map((folder) => join(folder, command))),
    ...places,
  ];
  return candidates.find(isProgram) ?? null;
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function installDebianPackages(): void {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const apt = (...args: string[]) =>
    execFileSync('apt-get', args, { env, stdio: ['ignore', 'ignore', 'inherit'] });
  apt('update');
  apt('install', '--yes', '--no-install-recommends', 'chromium', 'fonts-dejavu-core');
}
