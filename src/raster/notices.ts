import { datumShiftLeftOut } from './crs.ts';
import type { ElevationFile } from './elevation-file.ts';
import type { EpsgLookup } from './epsg.ts';
import type { Gap } from './gaps.ts';
import type { Plan } from './reading-plan.ts';
import type { SeamStep } from './seams.ts';
import type { Georeference, Notice } from './terrain.ts';

/** What the user should know about how the terrain was read. */
export async function planNotices(
  files: readonly ElevationFile[],
  { level, mosaic, rect, droppedColumn }: Plan,
  epsg: EpsgLookup | undefined,
): Promise<Notice[]> {
  const notices: Notice[] = [];
  const { cellWidth, cellHeight } = mosaic.placement;
  if (level > 0) {
    notices.push({
      kind: 'overview',
      message: `Overview ${level} was read, with cells of ${cellWidth} × ${cellHeight}; how it was averaged is not known, so every result is an estimate.`,
    });
  }
  if (rect.width < mosaic.width - (droppedColumn ? 1 : 0) || rect.height < mosaic.height) {
    notices.push({
      kind: 'window',
      message: `A window of ${rect.width} × ${rect.height} cells was read, from column ${rect.column}, row ${rect.row} of ${mosaic.width} × ${mosaic.height}; water from beyond it is not seen.`,
    });
  }
  if (droppedColumn) {
    notices.push({
      kind: 'duplicate-column',
      message: 'The last column lies on the first, 360° on; it was left out and is restored on writing.',
    });
  }
  const datums = new Set(files.map((file) => file.vertical.datum));
  if (datums.size > 1) {
    const silent = files.filter((file) => file.vertical.datum === null).map((file) => file.reader.name);
    notices.push({
      kind: 'vertical-datum',
      message: `${silent.join(', ')} tells no vertical datum; it was taken to be that of the other files.`,
    });
  }
  for (const file of files) {
    if (file.vertical.downwards) {
      notices.push({
        kind: 'vertical-datum',
        message: `${file.reader.name} holds depths below ${file.vertical.datum}; they became heights by changing the sign.`,
      });
    }
  }
  for (const { verticalRemark } of files) {
    if (verticalRemark !== null) notices.push({ kind: 'vertical-scale', message: verticalRemark });
  }
  const { crs } = files[0];
  if (await datumShiftLeftOut(crs, epsg)) {
    notices.push({
      kind: 'datum-shift',
      message: `The exact shift of ${crs.name} to WGS 84 needs a grid file that is not at hand; longitudes and latitudes may be off by some metres, or by hundreds where no simple shift is published.`,
    });
  }
  return notices;
}

/** A gap by place, in cells of the terrain and coordinates of its CRS. */
export function gapNotice(gap: Gap, { west, north, cellWidth, cellHeight }: Georeference): Notice {
  const x = west + gap.column * cellWidth;
  const y = north - gap.row * cellHeight;
  return {
    kind: 'gap',
    message:
      `Between ${gap.between[0]} and ${gap.between[1]} lies a gap of ${gap.width} × ${gap.height} cells at column ` +
      `${gap.column}, row ${gap.row} (${x} to ${x + gap.width * cellWidth} east, ${y - gap.height * cellHeight} to ${y} north); it is taken as a wall unless gaps are declared open (--gaps open), so name a file that covers it.`,
  };
}

export function seamNotice({ between, stepM, roughnessM, pairs }: SeamStep): Notice {
  return {
    kind: 'seam-step',
    message:
      `${between[1]} lies ${Math.abs(stepM).toFixed(2)} m ${stepM > 0 ? 'higher' : 'lower'} than ${between[0]} along ` +
      `their seam (median of ${pairs} pairs of cells; the ground beside it varies by ${roughnessM.toFixed(2)} m), so check their vertical datums.`,
  };
}
