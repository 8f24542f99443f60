import type { SurveyView } from './running.ts';

/** Centre of a pond's lowest cell, in the terrain's CRS; of equals the first. Null for a pond that is not there. */
export function pitOf(view: SurveyView, pond: string): readonly [number, number] | null {
  const { width, elevationM, leaf, levelM, pondOfLeaf, ponds, georeference: g } = view;
  const place = ponds.indexOf(pond);
  if (place < 0) return null;
  let pit = -1;
  for (let cell = 0; cell < elevationM.length; cell++) {
    const l = leaf[cell];
    if (l < 0 || pondOfLeaf[l] !== place || !(elevationM[cell] < levelM[l])) continue;
    if (pit < 0 || elevationM[cell] < elevationM[pit]) pit = cell;
  }
  if (pit < 0) return null;
  const row = Math.floor(pit / width);
  const column = pit - row * width;
  return [g.west + (column + 0.5) * g.cellWidth, g.north - (row + 0.5) * g.cellHeight];
}
