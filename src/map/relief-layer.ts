import { hillshade, type Light, northWestLight } from './hillshade.ts';
import { packed, type Rgb } from './packed-colour.ts';
import { lightPalette, type Palette } from './palette.ts';
import type { GatheredCells, PixelCells } from './pixel-cells.ts';
import { PixelLayer, type PixelLayerOptions } from './pixel-layer.ts';
import { PooledShade } from './pooled-shade.ts';

type Greys = Pick<Palette, 'shadow' | 'level' | 'lit' | 'blend'>;

/**
 * Shaded relief in greys, transparent on voids. It shades what the map shows beneath it; a page that wants it to
 * cover that sets the custom property `--brim-relief-blend: normal`.
 */
export class ReliefLayer extends PixelLayer {
  readonly #light: Light;
  #colour: Uint32Array;
  #blend: Palette['blend'];
  #shade: PooledShade | undefined;

  constructor(
    cells?: PixelCells,
    palette: Greys = lightPalette,
    light: Light = northWestLight,
    options?: PixelLayerOptions,
  ) {
    super('brim-relief', cells, options);
    this.#light = light;
    this.#colour = greys(palette, light);
    this.#blend = palette.blend;
  }

  protected override get blend(): string {
    return `var(--brim-relief-blend, ${this.#blend})`;
  }

  override setPixelCells(cells: PixelCells | undefined): void {
    this.#shade = undefined;
    super.setPixelCells(cells);
  }

  setPalette(palette: Greys): void {
    this.#colour = greys(palette, this.#light);
    this.#blend = palette.blend;
    this.changed();
    this.repaint();
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

/** Packed colour of each shade, with `level` at that of level ground; 0, a void, is transparent. */
function greys({ shadow, level, lit }: Greys, { altitudeDeg }: Light): Uint32Array {
  const flat = Math.sin((altitudeDeg * Math.PI) / 180);
  return Uint32Array.from({ length: 256 }, (_, shade) => {
    if (shade === 0) return 0;
    const light = (shade - 1) / 254;
    return light < flat
      ? packed(between(shadow, level, light / flat))
      : packed(between(level, lit, (light - flat) / (1 - flat)));
  });
}

function between(from: Rgb, to: Rgb, t: number): Rgb {
  const mixed = (of: 0 | 1 | 2): number => Math.round(from[of] + (to[of] - from[of]) * t);
  return [mixed(0), mixed(1), mixed(2)];
}
