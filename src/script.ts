// What `overbrim.js` puts on a page under the name `overbrim`; loading it defines all elements.
export { OverbrimError } from './core/index.ts';
export * from './elements/index.ts';
export { EngineClient, openEngine } from './engine/client.ts';
export * from './map/index.ts';
