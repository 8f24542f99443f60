import { expose } from 'comlink';
import { engineEntry } from './engine-entry.ts';
import { entryOnMainThread } from './entry-name.ts';

// The same file serves as a worker and, where none starts, as a script on the page.
if (typeof document === 'undefined') expose(engineEntry());
else Object.assign(globalThis, { [entryOnMainThread]: engineEntry });
