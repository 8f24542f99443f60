import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/index.ts';
import { checkedInputs, type Json } from '../../src/host/index.ts';
import { sampleDescription } from './sample-process.ts';

const checked = (inputs: Record<string, Json>) =>
  checkedInputs(sampleDescription, { places: ['here'], ...inputs });

describe('checkedInputs', () => {
  it('fills in defaults, leaves out what was left out, and makes one value a list', () => {
    expect(checkedInputs(sampleDescription, { places: 'here' })).toEqual({ places: ['here'], depth: 2 });
    expect(checked({ depth: 10, side: 'left', count: 4, wet: false })).toEqual({
      places: ['here'],
      depth: 10,
      side: 'left',
      count: 4,
      wet: false,
    });
  });

  it.each<[Record<string, Json>, string]>([
    [{ deep: 1 }, 'The process sample has no input "deep"; it takes places, depth, side, count, wet, code.'],
    [
      { constructor: 1 },
      'The process sample has no input "constructor"; it takes places, depth, side, count, wet, code.',
    ],
    [
      { depth: -1 },
      'The input "depth" is -1; expected a number of at least 0 and at most 10: least depth, metres.',
    ],
    [
      { depth: '3' },
      'The input "depth" is "3"; expected a number of at least 0 and at most 10: least depth, metres.',
    ],
    [
      { depth: Number.NaN },
      'The input "depth" is NaN; expected a number of at least 0 and at most 10: least depth, metres.',
    ],
    [{ side: 'up' }, 'The input "side" is "up"; expected one of left, right.'],
    [{ count: 1.5 }, 'The input "count" is 1.5; expected a whole number: how many.'],
    [{ wet: 1 }, 'The input "wet" is 1; expected a yes or no (true, false): whether wet.'],
    [{ wet: null }, 'The input "wet" is null; expected a yes or no (true, false): whether wet.'],
    [{ places: [] }, 'The input "places" has 0 values; expected 1 to 3.'],
    [{ places: ['a', 'b', 'c', 'd'] }, 'The input "places" has 4 values; expected 1 to 3.'],
    [{ places: ['a', 2] }, 'The input "places" is 2; expected a string: some places.'],
    [{ code: '4326' }, 'The input "code" is "4326"; expected a code, as EPSG:code.'],
    [{ code: 4326 }, 'The input "code" is 4326; expected a string: a code, as EPSG:code.'],
  ])('refuses %j', (inputs, message) => {
    expect(() => checked(inputs)).toThrow(new OverbrimError('bad-input', message));
  });

  it('names an input that is missing', () => {
    expect(() => checkedInputs(sampleDescription, {})).toThrow(
      'The input "places" (some places) is missing; the process sample cannot run without it, so give it.',
    );
  });

  it('shows only the start of a long value', () => {
    expect(() => checked({ side: 'x'.repeat(1000) })).toThrow(/^The input "side" is "x{76}…; expected/);
  });
});
