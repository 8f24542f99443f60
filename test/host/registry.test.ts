import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/index.ts';
import { Registry } from '../../src/host/index.ts';
import { sampleDescription, sampleProcess } from './sample-process.ts';

const process = sampleProcess(async () => ({}));
const named = (id: string) => ({ ...process, description: { ...sampleDescription, id } });

describe('Registry', () => {
  it('lists processes in the order of registration and finds them by id', () => {
    const registry = new Registry<null>().register(named('b')).register(named('a'));
    expect(registry.list().map(({ description }) => description.id)).toEqual(['b', 'a']);
    expect(registry.get('a').description.id).toBe('a');
  });

  it('says which processes there are when asked for another', () => {
    const registry = new Registry<null>().register(named('b')).register(named('a'));
    expect(() => registry.get('c')).toThrow(
      new OverbrimError('bad-input', 'There is no process "c"; expected one of b, a.'),
    );
    // Names that every object has are no processes.
    expect(() => registry.get('constructor')).toThrow('There is no process "constructor"');
  });

  it('refuses an id twice', () => {
    expect(() => new Registry<null>().register(named('a')).register(named('a'))).toThrow(
      'A process with the id "a" is registered already; choose another id.',
    );
  });

  it.each(['', 'Ponds', '1a', 'a b', 'a/b', 'ä'])('refuses "%s" as an id', (id) => {
    expect(() => new Registry<null>().register(named(id))).toThrow(
      `The process id is "${id}"; expected lower-case letters, digits and hyphens, so rename it.`,
    );
  });
});
