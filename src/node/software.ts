import { createRequire } from 'node:module';
import type { Software } from '../host/index.ts';

const require = createRequire(import.meta.url);
const { name, version }: Software = require('../../package.json');

/** This package, as results name it. */
export const software: Software = { name, version };
