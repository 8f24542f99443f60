import { cpus, release, totalmem, type } from 'node:os';

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** The machine, so that figures are never read without it. */
export function machine(): Readonly<Record<string, string | number>> {
  const all = cpus();
  return {
    cpu: all[0]?.model.trim() ?? 'unknown',
    cores: all.length,
    memoryGiB: Math.round(totalmem() / 2 ** 30),
    system: `${type()} ${release()}`,
    node: process.version,
  };
}

/** Rows of cells as text, columns padded to their widest cell, numbers to the right. */
export function table(head: readonly string[], rows: readonly (readonly (string | number)[])[]): string {
  const text = rows.map((row) => row.map((cell) => (typeof cell === 'number' ? cell.toFixed(2) : cell)));
  const widths = head.map((name, i) => Math.max(name.length, ...text.map((row) => row[i].length)));
  const line = (cells: readonly string[]): string =>
    cells.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]) : cell.padStart(widths[i]))).join('  ');
  return [line(head), line(widths.map((width) => '-'.repeat(width))), ...text.map(line)].join('\n');
}
