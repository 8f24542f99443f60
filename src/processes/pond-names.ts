import { type Depressions, type Drainage, noPond, type Survey } from '../core/index.ts';

/**
 * Names of ponds, made of their pit and pour-point cells (column.row each), so that neither tiling nor filters nor
 * edits elsewhere change them.
 */
export function pondNames(
  survey: Survey,
  drainage: Drainage,
  depressions: Depressions,
): (node: number) => string | null {
  const place = (cell: number): string => {
    const row = Math.floor(cell / survey.width);
    return `${cell - row * survey.width}.${row}`;
  };
  return (node) => {
    if (node === noPond) return null;
    const pit = survey.pitCell[depressions.pitLeaf[node]];
    return `pit-${place(pit)}-sill-${place(drainage.tree.sillCell[depressions.pourSill[node]])}`;
  };
}
