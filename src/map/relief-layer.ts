import { hillshade, type Light, northWestLight } from './hillshade.ts';
import { packed } from './packed-colour.ts';
import { lightPalette, type Palette } from './palette.ts';
import type { GatheredCells, PixelCells } from './pixel-cells.ts';
import { PixelLayer, type PixelLayerOptions } from './pixel-layer.ts';
import { PooledShade } from './pooled-shade.ts';

type Greys = Pick<Palette, 'shadow' | 'lit'>;

/** Shaded relief in greys, transparent on voids. */
export class ReliefLayer extends PixelLayer {
  readonly #light: Light;
  #colour: Uint32Array;
  #shade: PooledShade | undefined;

  constructor(
    cells?: PixelCells,
    palette: Greys = lightPalette,
    light: Light = northWestLight,
    options?: PixelLayerOptions,
  ) {
    super('brim-relief', cells, options);
    this.#light = light;
    this.#colour = greys(palette);
  }

  override setPixelCells(cells: PixelCells | undefined): void {
    this.#shade = undefined;
    super.setPixelCells(cells);
  }

  setPalette(palette: Greys): void {
    this.#colour = greys(palette);
    this.gatherAnew();
  }

  protected override paint({ index, halvings }: GatheredCells, _isNew: boolean, out: Uint32Array): void {
    const survey = this.pixelCells?.survey;
    if (!survey) return;
    this.#shade ??= new PooledShade(hillshade(survey, this.#light));
    const { value } = this.#shade.at(halvings);
    const colour = this.#colour;
    for (let at = 0; at < out.length; at++) {
      const cell = index[at];
      out[at] = cell < 0 ? 0 : colour[value[cell]];
    }
  }
}

/** Packed colour of each shade; 0, a void, is transparent. */
function greys({ shadow, lit }: Greys): Uint32Array {
  const between = (t: number, of: 0 | 1 | 2): number => Math.round(shadow[of] + (lit[of] - shadow[of]) * t);
  return Uint32Array.from({ length: 256 }, (_, shade) => {
    const t = (shade - 1) / 254;
    return shade === 0 ? 0 : packed([between(t, 0), between(t, 1), between(t, 2)]);
  });
}
