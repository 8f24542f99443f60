import { describe, expect, it } from 'vitest';
import { geographicMetrics, projectedMetrics } from '../../src/core/metrics.ts';

describe('metrics', () => {
  it('of a projected grid are the same in all rows', () => {
    const { uniform, eastM, southM, areaM2, areaBoundM2 } = projectedMetrics(3, 2, 0.5);
    expect(uniform).toBe(true);
    expect([[...eastM], [...southM], [...areaM2], areaBoundM2]).toEqual([
      [2, 2, 2],
      [0.5, 0.5, 0.5],
      [1, 1, 1],
      1,
    ]);
  });

  it('of a sphere are those of a sphere', () => {
    const radiusM = 6371000;
    const ball = { semiMajorM: radiusM, semiMinorM: radiusM };
    const { eastM, southM, areaM2 } = geographicMetrics(2, 90, 90, 90, ball);
    // Eighths of the ball, and lengths at the rows' middles.
    const eighth = (4 * Math.PI * radiusM ** 2) / 8;
    for (const area of areaM2) expect(area / eighth).toBeCloseTo(1, 12);
    expect(southM[0] / ((Math.PI / 2) * radiusM)).toBeCloseTo(1, 12);
    expect(eastM[0] / ((Math.PI / 2) * radiusM * Math.SQRT1_2)).toBeCloseTo(1, 12);
  });

  it('are cut at the poles where a row is registered on one', () => {
    const onPole = geographicMetrics(3, 91, 1, 2);
    const beside = geographicMetrics(1, 90, 1, 1);
    expect(onPole.eastM[0]).toBe(0);
    expect(onPole.areaM2[0]).toBe(beside.areaM2[0]);
    expect(geographicMetrics(2, -88, 1, 2).eastM[1]).toBeGreaterThanOrEqual(0);
    expect(onPole.areaBoundM2).toBe(onPole.areaM2[2]);
  });

  it('are the same north and south of the equator', () => {
    const { areaM2, eastM } = geographicMetrics(180, 90, 1, 1);
    for (let row = 0; row < 90; row++) {
      expect(areaM2[row] / areaM2[179 - row]).toBeCloseTo(1, 9);
      expect(eastM[row] / eastM[179 - row]).toBeCloseTo(1, 12);
    }
  });
});
