import { OverbrimError } from '../core/error.ts';
import type { ValueMeaning } from './cell-values.ts';
import type { Directory, TiffFile } from './directories.ts';
import { type GeoKeys, keys, numberKey } from './geo-keys.ts';
import { numbersOf, tags } from './tag-values.ts';

/** What the georeference makes of a stored value: `stored × scale + offset` in the unit of the vertical CRS. */
export interface VerticalScale {
  readonly scale: number;
  readonly offset: number;
  /** For the user, when the georeference says more than that values are heights as they stand. */
  readonly remark: string | null;
}

/** A model space with height: `height = perSample × stored + atZero`, 0 × stored where none is meant. */
interface Height {
  readonly perSample: number;
  readonly atZero: number;
  readonly tag: number;
}

/**
 * Scale and offset of heights that the georeference holds.
 * 1. Tie point (I, J, K, X, Y, Z) and cell scale (ScaleX, ScaleY, ScaleZ) give height = Z + (stored − K) × ScaleZ;
 *    of a transformation the third row does, its third and fourth number.
 * 2. A scale of 0 means that model space is flat (the usual case), 1 with offset 0 changes nothing.
 * 3. Without vertical keys model space has no height, so that numbers for it mean nothing: left aside, and said.
 * OGC GeoTIFF 1.1 (19-008r4), tags 33550, 33922 and 34264; values from memory. Checked against another reader.
 * @throws OverbrimError `unsupported` for heights that depend on the column or row, or are no finite numbers.
 */
export async function verticalScaleOf(
  tiff: TiffFile,
  directory: Directory,
  geoKeys: GeoKeys,
): Promise<VerticalScale> {
  const { name } = tiff.reader;
  const hasHeights = [keys.vertical, keys.verticalUnits].some((key) => (numberKey(geoKeys, key) ?? 0) !== 0);
  const { perSample, atZero, tag } = await heightOf(tiff, directory, hasHeights);
  const asStored = { scale: 1, offset: 0, remark: null };
  if (!hasHeights) {
    if (perSample === 0 || (perSample === 1 && atZero === 0)) return asStored;
    return {
      ...asStored,
      remark: `${name} scales heights by ${perSample} and adds ${atZero} in its georeference (tag ${tag}) but has no vertical CRS; both were left out, so give it a vertical CRS if the scale is meant.`,
    };
  }
  if (!Number.isFinite(perSample) || !Number.isFinite(atZero)) {
    throw new OverbrimError(
      'unsupported',
      `${name} scales heights by ${perSample} and adds ${atZero} (tag ${tag}); expected finite numbers, so mend its georeference.`,
    );
  }
  if (perSample === 0) {
    if (atZero === 0) return asStored;
    return {
      ...asStored,
      remark: `${name} places height 0 at ${atZero} but its vertical scale is 0 (tag ${tag}); both were left out, so mend its georeference if ${atZero} is to be added.`,
    };
  }
  if (perSample === 1 && atZero === 0) return asStored;
  return {
    scale: perSample,
    offset: atZero,
    remark: `${name} stores heights that its georeference (tag ${tag}) scales by ${perSample} and adds ${atZero} to; that was done.`,
  };
}

async function heightOf(tiff: TiffFile, directory: Directory, hasHeights: boolean): Promise<Height> {
  const scale = await numbersOf(tiff, directory, tags.cellScale);
  const ties = await numbersOf(tiff, directory, tags.tiePoints);
  if (scale.length >= 2 && ties.length === 6) {
    const perSample = scale[2] ?? 0;
    return { perSample, atZero: ties[5] - ties[2] * perSample, tag: tags.cellScale };
  }
  const matrix = await numbersOf(tiff, directory, tags.transformation);
  const tilted = matrix[2] !== 0 || matrix[6] !== 0 || matrix[8] !== 0 || matrix[9] !== 0;
  if (hasHeights && tilted) {
    throw new OverbrimError(
      'unsupported',
      `${tiff.reader.name} mixes heights with places (tag 34264); expected heights that depend on the stored value alone, so warp it to a level grid first.`,
    );
  }
  return { perSample: matrix[10], atZero: matrix[11], tag: tags.transformation };
}

/**
 * Joins the scale of the values (tag 42112) with that of the georeference. Many writers repeat one in the other, so
 * the same twice counts once, and one that changes nothing counts as silent.
 * @throws OverbrimError `unsupported` when they differ: either could be meant, and heights would be off by much.
 */
export function scaledMeaning(meaning: ValueMeaning, vertical: VerticalScale, name: string): ValueMeaning {
  if (vertical.scale === 1 && vertical.offset === 0) return meaning;
  const { scale, offset } = vertical;
  if (meaning.scale === 1 && meaning.offset === 0) return { ...meaning, scale, offset };
  if (near(meaning.scale, scale) && near(meaning.offset, offset)) return meaning;
  throw new OverbrimError(
    'unsupported',
    `${name} contradicts itself: its values are scaled by ${meaning.scale} plus ${meaning.offset} (tag 42112), its georeference by ${scale} plus ${offset}; mend the tags so that both agree.`,
  );
}

/** Equal but for rounding in text. */
function near(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-9 * Math.max(1e-9, Math.abs(a), Math.abs(b));
}
