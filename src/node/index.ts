export { epsgFiles } from './epsg-files.ts';
export { exitCodes } from './exit-codes.ts';
export { fileSource } from './file-source.ts';
export { main } from './main.ts';
export { reachFiles } from './reach-files.ts';
export type { Terminal } from './terminal.ts';
