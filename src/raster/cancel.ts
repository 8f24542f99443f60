import { OverbrimError } from '../core/error.ts';

/** Stops here when the caller has given up. */
export function stopIfCancelled(signal: AbortSignal | undefined): void {
  if (signal?.aborted) throw cancelled();
}

export function cancelled(cause?: unknown): OverbrimError {
  return new OverbrimError('cancelled', 'Reading the terrain was cancelled; nothing was kept.', { cause });
}
