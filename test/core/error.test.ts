import { expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';

it('an error carries its code, its sentence and what caused it', () => {
  const cause = new TypeError('deep');
  const error = new OverbrimError('unreadable', 'The file is torn.', { cause });
  expect(error).toBeInstanceOf(Error);
  expect([error.name, error.code, error.message, error.cause]).toEqual([
    'OverbrimError',
    'unreadable',
    'The file is torn.',
    cause,
  ]);
  expect(new OverbrimError('failed', 'So.').cause).toBeUndefined();
});
