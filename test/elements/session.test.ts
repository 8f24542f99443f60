import { describe, expect, it } from 'vitest';
import { Session } from '../../src/elements/session.ts';
import type { TracedPath } from '../../src/elements/traced-path.ts';

const path = { legs: [] } as unknown as TracedPath;

function sessionWithPath(): Session {
  const session = new Session(() => Promise.reject(new Error('no engine')));
  session.put({ selected: 'pond', path, leg: 1 });
  return session;
}

describe('a traced path', () => {
  it('goes with the selection where nothing lists it', () => {
    const session = sessionWithPath();
    session.put({ selected: 'other' });
    expect(session.state.path).toBe(path);
    let keys: readonly string[] = [];
    session.addEventListener('change', (event) => {
      keys = [...Reflect.get(event, 'keys')];
    });
    session.put({ selected: null });
    expect(session.state).toMatchObject({ path: null, leg: null });
    expect(keys).toEqual(['selected', 'path', 'leg']);
  });

  it('stays where an element on the page lists it', () => {
    const session = sessionWithPath();
    const list = { isConnected: true };
    session.pathLists.add(list);
    session.put({ selected: null });
    expect(session.state.path).toBe(path);
    session.put({ selected: 'pond' });
    list.isConnected = false;
    session.put({ selected: null });
    expect(session.state.path).toBe(null);
  });
});
