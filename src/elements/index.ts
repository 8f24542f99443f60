// Defines all elements; the host first, so that it answers the others at once.
export { BrimHost } from './brim-host.ts';
export { BrimLegend } from './brim-legend.ts';
export { BrimPourPoints } from './brim-pour-points.ts';
export { BrimSpillPath } from './brim-spill-path.ts';
export { BrimTerrain } from './brim-terrain.ts';
export { BrimErrorEvent } from './events/brim-error-event.ts';
export { BrimPathEvent } from './events/brim-path-event.ts';
export { BrimPondsEvent } from './events/brim-ponds-event.ts';
export { BrimSelectEvent } from './events/brim-select-event.ts';
export { BrimTerrainEvent } from './events/brim-terrain-event.ts';
