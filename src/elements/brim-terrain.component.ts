import { html, nothing, type PropertyDeclarations, type PropertyValues } from 'lit';
import { Card } from './card.ts';
import { BrimTerrainEvent } from './events/brim-terrain-event.ts';
import { fileDrop, fileDropLook } from './file-drop.ts';
import { fitMap } from './fit-map.ts';
import { surveyTerrain } from './questions.ts';
import type { Session, SessionChange, TerrainInputs } from './session.ts';
import { terrainFacts } from './terrain-facts.ts';
import { unitChoice, unitQuestion } from './unit-question.ts';

/** Attributes that shape the question; a change of one asks anew. */
const asked = ['src', 'verticalUnit', 'edges', 'voids', 'neighbours'];

/**
 * Takes an elevation model by address, file chooser or drop, asks for the vertical unit where the file does not name
 * it, and shows what the terrain is. On the map: relief and brimful water.
 *
 * @element brim-terrain
 * @attr src - Address of a GeoTIFF; several, separated by spaces, form one mosaic.
 * @attr {'m' | 'ft' | 'us-ft'} vertical-unit - Unit of the elevations where the file does not name it.
 * @attr {'open' | 'closed'} edges - Whether water leaves over the edge of the data.
 * @attr {'rim' | 'walls' | 'all'} voids - What cells without elevation are.
 * @attr {'8' | '4'} neighbours - Whether water also runs diagonally.
 * @attr without-fit - Leaves the map's view as it is.
 * @attr host - Id of a brim-host elsewhere on the page.
 * @fires {BrimTerrainEvent} brim-terrain - A terrain is surveyed and shown.
 * @slot - More content at the end of the card.
 * @csspart card - The card.
 * @csspart heading - Its heading.
 * @csspart drop - Where files are dropped.
 */
export class BrimTerrain extends Card {
  static override styles = [...Card.looks, fileDropLook];
  static override properties: PropertyDeclarations = {
    src: { type: String },
    verticalUnit: { type: String, attribute: 'vertical-unit' },
    edges: { type: String },
    voids: { type: String },
    neighbours: { type: String },
    withoutFit: { type: Boolean, attribute: 'without-fit' },
    isOver: { state: true },
    unanswered: { state: true },
  };

  declare src: string | null;
  declare verticalUnit: string | null;
  declare edges: string | null;
  declare voids: string | null;
  declare neighbours: string | null;
  declare withoutFit: boolean;
  /** Files hover over the card. */
  declare protected isOver: boolean;
  /** What was asked for last and gave no terrain; to ask again. */
  declare protected unanswered: Asked | null;
  #isAsked = false;

  constructor() {
    super();
    this.src = null;
    this.verticalUnit = null;
    this.edges = null;
    this.voids = null;
    this.neighbours = null;
    this.withoutFit = false;
    this.isOver = false;
    this.unanswered = null;
  }

  /** Surveys files of the user, as one mosaic when there are several. */
  async open(files: readonly File[]): Promise<void> {
    const { session } = this;
    if (!session || files.length === 0) return;
    // The names' order makes the order of a mosaic the same for any order of choosing.
    const sorted = [...files].sort((one, other) => (one.name < other.name ? -1 : 1));
    try {
      const engine = await session.running.engine();
      const terrain: string[] = [];
      for (const file of sorted) terrain.push(await engine.lend(file.name, file));
      await this.#survey(
        terrain,
        sorted.map(({ name }) => name),
      );
    } catch (error) {
      session.fault('failed', error instanceof Error ? error.message : String(error));
    }
  }

  override sessionChanged(session: Session, change: SessionChange | undefined): void {
    super.sessionChanged(session, change);
    if (!change) this.#isAsked = false;
    const { surveyed, layers } = session.state;
    if (change?.keys.has('withoutUnit') && session.state.withoutUnit) void this.#showQuestion();
    if (!surveyed || !change) return;
    if (change.keys.has('surveyed')) this.dispatchEvent(new BrimTerrainEvent(surveyed));
    if ((change.keys.has('surveyed') || change.keys.has('layers')) && layers && !this.withoutFit) {
      fitMap(layers.map, surveyed.view);
    }
  }

  protected override updated(changed: PropertyValues): void {
    if (!this.session) return;
    if (this.#isAsked && !asked.some((name) => changed.has(name))) return;
    this.#isAsked = true;
    const terrain = (this.src ?? '')
      .split(/\s+/)
      .filter((address) => address !== '')
      .map(absolute);
    if (terrain.length > 0) void this.#survey(terrain, terrain.map(lastPart));
  }

  /** The question is brought into view, since nothing goes on without its answer. */
  async #showQuestion(): Promise<void> {
    await this.updateComplete;
    this.renderRoot.querySelector('.unit-question')?.scrollIntoView({ block: 'nearest' });
  }

  protected override render(): unknown {
    const { voice } = this;
    const surveyed = this.state?.surveyed ?? null;
    const withoutUnit = this.state?.withoutUnit ?? null;
    const drop = fileDrop(voice, {
      isLoaded: surveyed !== null || withoutUnit !== null,
      isOver: this.isOver,
      onOver: (isOver) => {
        this.isOver = isOver;
      },
      onFiles: (files) => void this.open(files),
    });
    const ask = (inputs: TerrainInputs, names: readonly string[]) => (unit: string) => {
      void this.#ask({ ...inputs, verticalUnit: unit }, names);
    };
    return this.card(
      voice.say(surveyed ? 'terrainLoaded' : 'terrainHeading'),
      html`
        ${
          withoutUnit
            ? html`<div class="unit-question">
                ${unitQuestion(voice, withoutUnit.names, ask(withoutUnit.inputs, withoutUnit.names))}
              </div>`
            : nothing
        }
        ${surveyed || withoutUnit || !this.unanswered ? nothing : this.#again(this.unanswered)}
        ${
          surveyed
            ? terrainFacts(
                voice,
                surveyed,
                // Where no unit was given, the file names its own, and another would be refused.
                surveyed.inputs.verticalUnit === undefined
                  ? html`${voice.say(unitNames[surveyed.view.verticalUnit])}`
                  : unitChoice(voice, surveyed.view.verticalUnit, ask(surveyed.inputs, surveyed.names)),
              )
            : nothing
        }
        ${drop}
      `,
    );
  }

  #again({ inputs, names }: Asked): unknown {
    return html`
      <button type="button" @click=${() => void this.#ask(inputs, names)}>
        ${this.voice.say('askAgain', { name: names.join(', ') })}
      </button>
    `;
  }

  async #ask(inputs: TerrainInputs, names: readonly string[]): Promise<void> {
    const { session } = this;
    if (!session) return;
    this.unanswered = null;
    await surveyTerrain(session, inputs, names);
    // Another question may have taken the place of this one, and runs.
    if (!session.running.jobs.some(({ kind }) => kind === 'terrain')) this.unanswered = { inputs, names };
  }

  #survey(terrain: readonly string[], names: readonly string[]): Promise<void> {
    return this.#ask(
      {
        terrain,
        ...(this.verticalUnit === null ? {} : { verticalUnit: this.verticalUnit }),
        ...(this.edges === null ? {} : { edges: this.edges }),
        ...(this.voids === null ? {} : { voids: this.voids }),
        ...(this.neighbours === null ? {} : { neighbours: Number(this.neighbours) }),
      },
      names,
    );
  }
}

interface Asked {
  readonly inputs: TerrainInputs;
  readonly names: readonly string[];
}

const unitNames = { m: 'unitM', ft: 'unitFt', 'us-ft': 'unitUsFt' } as const;

/** What is no address stays as it is; the reader then says so in words. */
function absolute(address: string): string {
  try {
    return new URL(address, document.baseURI).href;
  } catch {
    return address;
  }
}

function lastPart(address: string): string {
  return address.split(/[?#]/)[0].split('/').pop() || address;
}

declare global {
  interface HTMLElementTagNameMap {
    'brim-terrain': BrimTerrain;
  }
}
