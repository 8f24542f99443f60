import cliProgress from 'cli-progress';
import type { JobProgress } from '../host/index.ts';
import type { Terminal } from './terminal.ts';

/** Shows a job's progress on standard error: a bar on a terminal, a plain line now and then otherwise. */
export interface ProgressDisplay {
  show(progress: JobProgress): void;
  end(): void;
}

export const silent: ProgressDisplay = { show: () => {}, end: () => {} };

export function progressDisplay(terminal: Terminal): ProgressDisplay {
  return terminal.stderr.isTTY === true ? bar(terminal) : lines(terminal);
}

function bar(terminal: Terminal): ProgressDisplay {
  const single = new cliProgress.SingleBar(
    {
      stream: terminal.stderr,
      format: '{bar} {percentage} %  {doing}  {times}',
      barCompleteChar: '━',
      barIncompleteChar: '┄',
      barsize: 28,
      hideCursor: true,
      clearOnComplete: true,
      stopOnComplete: false,
    },
    cliProgress.Presets.legacy,
  );
  single.start(100, 0, { doing: '', times: '' });
  return {
    show: ({ percent, doing, elapsedMs, expectedMs }) =>
      single.update(percent, {
        doing,
        times: `${seconds(elapsedMs)}${expectedMs === null ? '' : ` of about ${seconds(expectedMs)}`}`,
      }),
    end: () => single.stop(),
  };
}

/** A line at each tenth of the work and whenever something else is done. */
function lines(terminal: Terminal): ProgressDisplay {
  let last = '';
  return {
    show: ({ percent, doing, elapsedMs }) => {
      const state = `${Math.floor(percent / 10)} ${doing}`;
      if (doing === '' || state === last) return;
      last = state;
      terminal.stderr.write(`${String(percent).padStart(3)} % ${doing} (${seconds(elapsedMs)})\n`);
    },
    end: () => {},
  };
}

function seconds(ms: number): string {
  return `${(ms / 1000).toFixed(ms < 10_000 ? 1 : 0)} s`;
}
