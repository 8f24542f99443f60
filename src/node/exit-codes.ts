/** Exit codes of the command line. */
export const exitCodes = { done: 0, failed: 1, wrongUse: 2, interrupted: 130 } as const;
