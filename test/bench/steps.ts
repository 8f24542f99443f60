import type * as Core from '../../src/core/index.ts';

export type CoreModule = typeof Core;

/** One run over a terrain: times by step in seconds, levels for the check, and sizes worth telling. */
export interface Run {
  readonly seconds: Readonly<Record<StepName, number>>;
  readonly levelM: Float32Array;
  readonly leaves: number;
  readonly outermostPonds: number;
  /** Survey and elevation together. */
  readonly bytesPerCell: number;
}

export const stepNames = ['survey', 'drainage', 'brim levels', 'hierarchy', 'measures'] as const;
export type StepName = (typeof stepNames)[number];

/** Steps that together answer a question, each compared with the textbook's time. */
export const answers: Readonly<Record<string, readonly StepName[]>> = {
  levels: ['survey', 'drainage', 'brim levels'],
  'all ponds, with volumes': ['survey', 'drainage', 'hierarchy', 'measures'],
  everything: stepNames,
};

/** Runs the measured steps once on the built core. */
export function runOnce(core: CoreModule, elevationM: Float32Array, side: number): Run {
  const seconds: Record<StepName, number> = {
    survey: 0,
    drainage: 0,
    'brim levels': 0,
    hierarchy: 0,
    measures: 0,
  };
  const timed = <T>(step: StepName, does: () => T): T => {
    const start = performance.now();
    const result = does();
    seconds[step] = (performance.now() - start) / 1000;
    return result;
  };
  const grid = core.gridOf(side, side, elevationM, core.projectedMetrics(side, 1, 1));
  const survey = timed('survey', () => core.surveyOf(grid));
  const drainage = timed('drainage', () =>
    core.drainageOf(survey, core.outletSills(grid, survey, core.usualOutlets)),
  );
  const levelM = timed('brim levels', () => core.brimLevels(grid, survey, drainage));
  const depressions = timed('hierarchy', () => core.depressionsOf(survey, drainage));
  timed('measures', () => core.pondMeasures(grid, survey, drainage, depressions));
  const { parent, isPond } = depressions;
  const bytes = survey.buffer.byteLength + elevationM.byteLength;
  return {
    seconds,
    levelM,
    leaves: survey.leaves,
    outermostPonds: isPond.reduce((sum, pond, node) => sum + (pond === 1 && parent[node] === -1 ? 1 : 0), 0),
    bytesPerCell: bytes / elevationM.length,
  };
}
