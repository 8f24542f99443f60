import type Projection from 'ol/proj/Projection.js';
import type { Transform } from '../raster/transform.ts';
import type { CanvasFrame } from './canvas-frame.ts';
import { cellIndices } from './cell-indices.ts';
import { viewToTerrain } from './projections.ts';
import type { SurveyView } from './survey-view.ts';
import { cellsPerSample, viewLattice } from './view-lattice.ts';

/** The cell under each sample of a frame. */
export interface GatheredCells {
  /** Tells one frame from another. */
  readonly key: string;
  readonly width: number;
  readonly height: number;
  /** Halvings of the grid that `index` counts in: 0 = the cells themselves. */
  readonly halvings: number;
  /** Row-major place in the halved grid, −1 where the terrain is not. */
  readonly index: Int32Array;
}

/** Finds the cells under the samples, once a view for all layers that paint the same survey. */
export class PixelCells {
  readonly survey: SurveyView;
  #latest: GatheredCells | undefined;
  #projection: Projection | undefined;
  #toTerrain: Transform | undefined;
  #index = new Int32Array(0);

  constructor(survey: SurveyView) {
    this.survey = survey;
  }

  at(frame: CanvasFrame, view: Projection): GatheredCells {
    const { width, height } = frame;
    const key = [width, height, frame.step, ...frame.toView, view.getCode()].join();
    if (this.#latest?.key === key) return this.#latest;
    if (this.#toTerrain === undefined || this.#projection !== view) {
      this.#toTerrain = viewToTerrain(view, this.survey.georeference.crs);
      this.#projection = view;
    }
    const lattice = viewLattice(frame, this.#toTerrain, this.survey);
    const cells = cellsPerSample(lattice, this.survey);
    const halvings = cells > 2 ? Math.ceil(Math.log2(cells / 2)) : 0;
    if (this.#index.length !== width * height) this.#index = new Int32Array(width * height);
    cellIndices(frame, lattice, this.survey, halvings, this.#index);
    this.#latest = { key, width, height, halvings, index: this.#index };
    return this.#latest;
  }
}
