#!/usr/bin/env node
import { main } from './main.ts';
import { sparedWrites } from './spared-writes.ts';

const args = process.argv.slice(2);
const printed = sparedWrites(process, args.includes('--json'));
const code = await main(args, process);
process.exitCode = code === 0 ? await printed() : code;
