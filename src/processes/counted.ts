/** A number with its noun: `1 cell`, `2 cells`. */
export function counted(count: number, one: string, several = `${one}s`): string {
  return `${count} ${count === 1 ? one : several}`;
}
