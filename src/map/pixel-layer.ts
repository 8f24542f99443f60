import Layer from 'ol/layer/Layer.js';
import type { FrameState } from 'ol/Map.js';
import { type CanvasFrame, canvasFrame } from './canvas-frame.ts';
import { clipPolygon } from './clip-polygon.ts';
import type { GatheredCells, PixelCells } from './pixel-cells.ts';

/** Samples from which half resolution is taken while the view moves: more than a full-HD screen. */
const manySamples = 2_500_000;

/** Places in a frame's viewHints, which the script-tag build of OpenLayers does not name. */
const animating = 0;
const interacting = 1;

/** What a layer that paints cells may be given; the usual options of layers. */
export type PixelLayerOptions = Readonly<{
  opacity?: number;
  visible?: boolean;
  zIndex?: number;
  extent?: number[];
}>;

/** A layer that paints each device pixel from the cell under its centre, on a canvas of its own. */
export abstract class PixelLayer extends Layer {
  #cells: PixelCells | undefined;
  #container: HTMLDivElement | undefined;
  #canvas: HTMLCanvasElement | undefined;
  #image: ImageData | undefined;
  #shown: GatheredCells | undefined;
  #shownKey = '';

  /** @param name added to the class of the element, so that no other layer takes the canvas for its own */
  constructor(name: string, cells: PixelCells | undefined, options: PixelLayerOptions = {}) {
    super({ ...options, className: `ol-layer ${name}` });
    this.#cells = cells;
  }

  /** How the layer lies on what is beneath it, as CSS has it. */
  protected get blend(): string {
    return '';
  }

  /** Colours of all samples, packed, 0 = transparent. `isNew`: the cells are others than last time. */
  protected abstract paint(cells: GatheredCells, isNew: boolean, out: Uint32Array): void;

  get pixelCells(): PixelCells | undefined {
    return this.#cells;
  }

  /** Shows another survey, or none. */
  setPixelCells(cells: PixelCells | undefined): void {
    this.#cells = cells;
    this.gatherAnew();
  }

  override render(frame: FrameState | null, _target: HTMLElement | null): HTMLElement | null {
    const viewport = this.getMapInternal()?.getViewport();
    const state = frame?.layerStatesArray[frame.layerIndex];
    if (!frame || !state || !viewport || !this.#cells) return null;
    const rect = viewport.getBoundingClientRect();
    // The map keeps the ratio it was made with; the window's may have changed since.
    const ratio = window.devicePixelRatio;
    const moves = frame.viewHints[animating] > 0 || frame.viewHints[interacting] > 0;
    const isLarge = rect.width * rect.height * ratio * ratio > manySamples;
    const at = canvasFrame(rect, ratio, frame.pixelToCoordinateTransform, moves && isLarge ? 2 : 1);
    if (at.width === 0 || at.height === 0) return null;
    const container = this.#placed(at);
    const opacity = String(state.opacity);
    if (container.style.opacity !== opacity) container.style.opacity = opacity;
    if (container.style.mixBlendMode !== this.blend) container.style.mixBlendMode = this.blend;
    container.style.clipPath = clipPolygon(state.extent, frame.coordinateToPixelTransform);
    const cells = this.#cells.at(at, frame.viewState.projection);
    if (cells.key !== this.#shownKey) {
      this.#shown = cells;
      this.#shownKey = cells.key;
      this.#put(true);
    }
    this.rendered = true;
    return container;
  }

  /** Paints the view at hand with other colours, without a frame of the map. */
  protected repaint(): void {
    if (this.#shown) this.#put(false);
  }

  /** Lets the next frame gather all values again. */
  protected gatherAnew(): void {
    this.#shown = undefined;
    this.#shownKey = '';
    this.changed();
  }

  #put(isNew: boolean): void {
    const context = this.#canvas?.getContext('2d');
    const cells = this.#shown;
    if (!context || !cells) return;
    if (this.#image?.width !== cells.width || this.#image.height !== cells.height) {
      this.#image = context.createImageData(cells.width, cells.height);
    }
    this.paint(cells, isNew, new Uint32Array(this.#image.data.buffer));
    context.putImageData(this.#image, 0, 0);
  }

  #placed(at: CanvasFrame): HTMLDivElement {
    if (!this.#container || !this.#canvas) {
      this.#container = document.createElement('div');
      this.#container.className = this.getClassName();
      this.#container.style.cssText = 'position:absolute;inset:0;pointer-events:none';
      this.#canvas = document.createElement('canvas');
      this.#canvas.style.cssText = 'position:absolute;max-width:none;max-height:none';
      this.#container.append(this.#canvas);
    }
    const canvas = this.#canvas;
    if (canvas.width !== at.width || canvas.height !== at.height) {
      canvas.width = at.width;
      canvas.height = at.height;
      this.#shownKey = '';
    }
    canvas.style.left = `${at.left}px`;
    canvas.style.top = `${at.top}px`;
    canvas.style.width = `${at.cssWidth}px`;
    canvas.style.height = `${at.cssHeight}px`;
    return this.#container;
  }
}
