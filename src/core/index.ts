export { brimLevels } from './brim-level.ts';
export { distanceM, neighboursOf } from './cell-steps.ts';
export { type DepressionTree, depressionTree, largestUpTo, smallestAbove } from './depression-tree.ts';
export { type Depressions, depressionsOf, outermostOf } from './depressions.ts';
export { type Drainage, drainageOf, nowhere, outside } from './drainage.ts';
export { type ErrorCode, OverbrimError } from './error.ts';
export type { Sills } from './forest.ts';
export {
  type CellRect,
  type Frame,
  type Grid,
  gridOf,
  type Neighbours,
  plainFrame,
  type Side,
} from './grid.ts';
export {
  type Ellipsoid,
  geographicMetrics,
  projectedMetrics,
  type RowMetrics,
  wgs84,
} from './metrics.ts';
export {
  noOutletCells,
  type OutletCells,
  type OutletRules,
  outletPits,
  outletSills,
  usualOutlets,
} from './outlets.ts';
export { type PondMeasures, pondMeasures } from './pond-measures.ts';
export { type OutlineColumns, type PondOutline, pondOfCells, pondOutlines } from './pond-outlines.ts';
export { ReceiverField } from './receiver-field.ts';
export type { Polygon } from './rings.ts';
export { shortestWay } from './shortest-way.ts';
export { type SpillLeg, type SpillPath, spillPath } from './spill-path.ts';
export { noPond, spillsInto } from './spills-into.ts';
export { type Survey, viewSurvey } from './survey.ts';
export { largestTile, type SurveyOptions, surveyOf, surveySteps } from './survey-grid.ts';
