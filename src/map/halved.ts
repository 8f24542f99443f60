/** Cells along a side after so many halvings; an odd last cell stays alone. */
export function halved(side: number, halvings: number): number {
  return Math.ceil(side / 2 ** halvings);
}
