import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { software } from '../../src/host/index.ts';

it('names the package and its version as package.json does', () => {
  const { name, version } = JSON.parse(readFileSync('package.json', 'utf8'));
  expect(software).toEqual({ name, version });
});
