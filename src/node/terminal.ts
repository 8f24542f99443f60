/** What the command line needs of its surroundings; `process` fits. */
export interface Terminal {
  readonly stdout: { write(text: string): unknown };
  readonly stderr: NodeJS.WritableStream & { readonly isTTY?: boolean };
  on(event: 'SIGINT' | 'SIGTERM', listener: () => void): unknown;
  off(event: 'SIGINT' | 'SIGTERM', listener: () => void): unknown;
}
