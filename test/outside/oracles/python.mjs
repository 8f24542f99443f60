import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

/** The system's Python, which sees the libraries that Debian packages. */
const interpreter = '/usr/bin/python3';

/** One sentence about libraries that cannot be imported and how to get them; null where all are there. */
export function missingLibraries() {
  const { status } = spawnSync(interpreter, ['-c', 'import skimage, scipy, rasterio']);
  if (status === 0) return null;
  return (
    `${interpreter} cannot import skimage, scipy and rasterio; ` +
    'install them on Debian with: apt-get install python3-skimage python3-scipy python3-rasterio'
  );
}

/** What a script beside this file prints. @throws Error with what it says when it fails. */
export function python(script, given) {
  const path = fileURLToPath(new URL(script, import.meta.url));
  const { status, stdout, stderr, error } = spawnSync(interpreter, ['-B', path, ...given], {
    encoding: 'utf8',
    maxBuffer: 2 ** 26,
  });
  if (status !== 0) throw new Error(`${script} ${given.join(' ')} failed: ${error?.message ?? stderr}`);
  return stdout;
}
