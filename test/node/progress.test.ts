import { describe, expect, it } from 'vitest';
import type { JobProgress } from '../../src/host/index.ts';
import { progressDisplay, silent } from '../../src/node/progress.ts';
import { FakeTerminal } from './fake-terminal.ts';

const at = (percent: number, doing: string, elapsedMs = 1234): JobProgress => ({
  status: 'running',
  percent,
  doing,
  elapsedMs,
  expectedMs: null,
});

const shown = async (isTTY: boolean, ...all: JobProgress[]) => {
  const terminal = new FakeTerminal(isTTY);
  const display = progressDisplay(terminal);
  for (const progress of all) display.show(progress);
  display.end();
  await new Promise((resolve) => setImmediate(resolve));
  return terminal.err;
};

describe('progress', () => {
  it('is a line at each tenth and for each thing that is done, without a terminal', async () => {
    const lines = await shown(
      false,
      at(0, ''),
      at(0, 'reading'),
      at(3, 'reading'),
      at(12, 'reading'),
      at(19, 'reading'),
      at(19, 'surveying'),
      at(100, 'surveying', 65_432),
    );
    expect(lines).toBe(
      '  0 % reading (1.2 s)\n 12 % reading (1.2 s)\n 19 % surveying (1.2 s)\n100 % surveying (65 s)\n',
    );
  });

  it('is a bar on a terminal, which gives the cursor back in the end', async () => {
    const text = await shown(true, at(50, 'surveying'), { ...at(60, 'surveying'), expectedMs: 2000 });
    expect(text).toContain('0 %');
    expect(text).toContain('\u001B[?25l');
    expect(text).toContain('\u001B[?25h');
  });

  it('is nothing when not wanted', () => {
    expect(() => {
      silent.show(at(5, 'reading'));
      silent.end();
    }).not.toThrow();
  });
});
