#!/usr/bin/env node
import { main } from './main.ts';
import { sparedWrites } from './spared-writes.ts';

const printed = sparedWrites(process);
const code = await main(process.argv.slice(2), process);
process.exitCode = code === 0 ? await printed() : code;
