import { type DepthColours, depthColours, paintDepths } from './depth-colours.ts';
import { type DepthClass, lightPalette } from './palette.ts';
import type { GatheredCells, PixelCells } from './pixel-cells.ts';
import { PixelLayer, type PixelLayerOptions } from './pixel-layer.ts';
import { PooledSurvey } from './pooled-survey.ts';

/** Time without a new level after which a view of pooled cells is gathered again, milliseconds. */
const settledMs = 150;

/**
 * Standing water by depth class. Ground and leaf under each pixel are gathered once a view; other levels or classes
 * are then one pass over the pixels.
 */
export class WetLayer extends PixelLayer {
  #colours: DepthColours;
  #levelM: Float32Array | undefined;
  #pooled: PooledSurvey | undefined;
  #groundM = new Float32Array(0);
  #leaf = new Int32Array(0);
  #halvings = 0;
  #settling: ReturnType<typeof setTimeout> | undefined;

  /** Shows the brimful state of the survey until other levels are set. */
  constructor(
    cells?: PixelCells,
    classes: readonly DepthClass[] = lightPalette.depths,
    options?: PixelLayerOptions,
  ) {
    super('brim-wet', cells, options);
    this.#colours = depthColours(classes);
  }

  override setPixelCells(cells: PixelCells | undefined): void {
    this.#levelM = undefined;
    this.#pooled = undefined;
    super.setPixelCells(cells);
  }

  /** The levels that were set; undefined = brimful. */
  get levelM(): Float32Array | undefined {
    return this.#levelM;
  }

  /** Water level of each leaf, metres, +∞ = none; undefined = brimful. */
  setLevels(levelM: Float32Array | undefined): void {
    this.#levelM = levelM;
    this.#pooled = undefined;
    this.repaint();
    // A pooled pixel stands for its deepest cell, which may be another one at other levels.
    clearTimeout(this.#settling);
    if (this.#halvings > 0) this.#settling = setTimeout(() => this.gatherAnew(), settledMs);
  }

  setClasses(classes: readonly DepthClass[]): void {
    this.#colours = depthColours(classes);
    this.repaint();
  }

  protected override paint(cells: GatheredCells, isNew: boolean, out: Uint32Array): void {
    const survey = this.pixelCells?.survey;
    if (!survey) return;
    const levelM = this.#levelM ?? survey.levelM;
    if (isNew) {
      this.#pooled ??= new PooledSurvey(survey, levelM);
      this.#gather(cells, this.#pooled);
    }
    paintDepths(this.#groundM, this.#leaf, levelM, this.#colours, out);
  }

  #gather({ index, halvings }: GatheredCells, pooled: PooledSurvey): void {
    const from = pooled.at(halvings);
    if (this.#groundM.length !== index.length) {
      this.#groundM = new Float32Array(index.length);
      this.#leaf = new Int32Array(index.length);
    }
    this.#halvings = halvings;
    const groundM = this.#groundM;
    const leaf = this.#leaf;
    for (let at = 0; at < index.length; at++) {
      const cell = index[at];
      if (cell < 0) leaf[at] = -1;
      else {
        groundM[at] = from.groundM[cell];
        leaf[at] = from.leaf[cell];
      }
    }
  }

  protected override disposeInternal(): void {
    clearTimeout(this.#settling);
    super.disposeInternal();
  }
}
