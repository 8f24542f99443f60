import type Feature from 'ol/Feature.js';
import type MultiPolygon from 'ol/geom/MultiPolygon.js';
import LayerGroup from 'ol/layer/Group.js';
import VectorLayer from 'ol/layer/Vector.js';
import VectorImageLayer from 'ol/layer/VectorImage.js';
import VectorSource from 'ol/source/Vector.js';
import type { StyleLike } from 'ol/style/Style.js';

/** Numbers in coordinates from which shores are drawn into an image, and not anew in each frame of a move. */
const manyNumbers = 200_000;

/** The shores of ponds: sharp in every frame, or, for large results, an image that moves with the view. */
export class OutlineLayers extends LayerGroup {
  readonly #source = new VectorSource();
  readonly #sharp = new VectorLayer({ source: this.#source });
  readonly #image = new VectorImageLayer({ source: this.#source, imageRatio: 1.5, visible: false });

  constructor() {
    super();
    this.getLayers().extend([this.#sharp, this.#image]);
  }

  show(outlines: readonly Feature<MultiPolygon>[]): void {
    let numbers = 0;
    for (const outline of outlines) numbers += outline.getGeometry()?.getFlatCoordinates().length ?? 0;
    this.#image.setVisible(numbers > manyNumbers);
    this.#sharp.setVisible(numbers <= manyNumbers);
    this.#source.clear(true);
    this.#source.addFeatures([...outlines]);
  }

  setStyle(style: StyleLike): void {
    this.#sharp.setStyle(style);
    this.#image.setStyle(style);
  }
}
