import { describe, expect, it } from 'vitest';
import { canvasFrame } from '../../src/map/canvas-frame.ts';
import { randomNumbers } from './made-view.ts';

describe('canvasFrame', () => {
  it('covers the viewport, begins and ends on device pixels, and places their centres', () => {
    const random = randomNumbers(4);
    for (let round = 0; round < 2000; round++) {
      const ratio = [1, 1.25, 1.5, 2, 3, 0.9, 1.1, 4 / 3][round % 8];
      const rect = {
        left: Math.round(random() * 6400) / 64,
        top: Math.round(random() * 6400) / 64,
        width: 50 + Math.round(random() * 64000) / 64,
        height: 50 + Math.round(random() * 64000) / 64,
      };
      const turn = random() * 6;
      const affine = [Math.cos(turn), Math.sin(turn), Math.sin(turn), -Math.cos(turn), 1e6, 5e6];
      const frame = canvasFrame(rect, ratio, affine, 1);
      for (const [side, length] of [
        [rect.left + frame.left, frame.cssWidth],
        [rect.top + frame.top, frame.cssHeight],
      ]) {
        expect(side * ratio).toBeCloseTo(Math.round(side * ratio), 2);
        expect(length * ratio).toBeCloseTo(Math.round(length * ratio), 6);
      }
      expect(frame.left).toBeLessThanOrEqual(0.002);
      expect(frame.left + frame.cssWidth).toBeGreaterThanOrEqual(rect.width - 0.002);
      expect(frame.top + frame.cssHeight).toBeGreaterThanOrEqual(rect.height - 0.002);
      const [i, j] = [Math.floor(random() * frame.width), Math.floor(random() * frame.height)];
      const [a, b, c, d, e, f] = frame.toView;
      // The same centre by CSS pixels of the viewport, as the map library counts them.
      const x = frame.left + (i + 0.5) / ratio;
      const y = frame.top + (j + 0.5) / ratio;
      expect(a * i + c * j + e).toBeCloseTo(affine[0] * x + affine[2] * y + 1e6, 6);
      expect(b * i + d * j + f).toBeCloseTo(affine[1] * x + affine[3] * y + 5e6, 6);
    }
  });

  it('takes a quarter of the samples at a step of two, over the same ground', () => {
    const rect = { left: 0, top: 0, width: 101, height: 50 };
    const frame = canvasFrame(rect, 1, [1, 0, 0, -1, 0, 0], 2);
    expect([frame.width, frame.height, frame.cssWidth, frame.cssHeight]).toEqual([51, 25, 102, 50]);
    expect(frame.toView).toEqual([2, 0, 0, -2, 1, -1]);
  });
});
