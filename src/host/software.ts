import type { Software } from './lineage.ts';

/** This package, as results name it; the version is that of package.json. */
export const software: Software = { name: 'overbrim', version: '0.1.0' };
