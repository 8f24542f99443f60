/** What went wrong, as a word that programs can test. */
export type ErrorCode =
  | 'bad-input'
  | 'unsupported'
  | 'too-large'
  | 'unreadable'
  | 'unit-missing'
  | 'no-outlet'
  | 'out-of-memory'
  | 'cancelled'
  | 'failed';

/**
 * An error that a person is meant to read. The message is one sentence that holds the value found, what was
 * expected, and what to do about it. Thrown at public edges only.
 */
export class OverbrimError extends Error {
  readonly code: ErrorCode;

  constructor(code: ErrorCode, message: string, options?: { cause?: unknown }) {
    super(message, options);
    this.name = 'OverbrimError';
    this.code = code;
  }
}
