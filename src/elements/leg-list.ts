import { css, html, nothing, type TemplateResult } from 'lit';
import { footM } from './measures.ts';
import type { Leg, TracedPath } from './traced-path.ts';
import type { Voice } from './voice.ts';

/** Legs shown before more are asked for; paper has them all. */
const fewLegs = 12;

export const legListLook = css`
  .place {
    flex-wrap: nowrap;
    margin-block-start: 0.125rem;
  }
  .place input {
    flex: 1;
    min-width: 0;
  }
  .stacked {
    display: block;
  }
  .in {
    flex-wrap: nowrap;
  }
  .in select {
    flex: 1;
    min-width: 0;
  }
  form > .place,
  form > .in {
    margin-block-start: 0.25rem;
  }
  .legs {
    list-style: none;
    border-block-start: 1px solid var(--ink);
  }
  .leg {
    display: flex;
    flex-wrap: wrap;
    column-gap: 0.5rem;
    align-items: center;
    width: 100%;
    text-align: start;
    border: 0;
    border-block-end: 1px solid var(--line);
    border-radius: 0;
    padding: 0.1875rem 0.375rem;
    min-height: 1.75rem;
  }
  .leg.pointed {
    background: var(--wash);
    box-shadow: inset 3px 0 var(--accent);
  }
  .leg:focus-visible {
    outline-offset: -2px;
  }
  .leg .number {
    min-width: 1.25rem;
    color: var(--muted);
  }
  .leg .figures {
    flex: 1;
    text-align: end;
    white-space: nowrap;
  }
  .leg svg {
    display: block;
  }
  @media screen {
    .later {
      display: none;
    }
  }
  @media print {
    button.leg {
      display: flex;
    }
    .legs li {
      break-inside: avoid;
    }
  }
  .stroke {
    stroke: var(--accent);
    stroke-width: 3;
    fill: none;
  }
`;

interface LegList {
  readonly path: TracedPath;
  /** The leg that is pointed at. */
  readonly leg: number | null;
  readonly showsAll: boolean;
  readonly numberOf: (pond: string) => number | null;
  readonly onPoint: (leg: number | null) => void;
  readonly onShow: (leg: number) => void;
  readonly onAll: () => void;
  readonly onClear: () => void;
}

/** A path in sum and leg by leg. Pointing at a leg, or reaching it by keyboard, marks it on the map. */
export function legList(voice: Voice, list: LegList): TemplateResult {
  const { say, measures } = voice;
  const { path, showsAll, onAll, onClear } = list;
  const shown = showsAll ? path.legs.length : fewLegs;
  return html`
    <div part="legs" class="stack">
      <p class="lead">
        ${say('pathTotal', {
          length: measures.length(path.lengthM),
          drop: measures.elevation(path.dropM),
          storage: storage(voice, path.storageM3),
        })}
        ${say(path.endsAt === 'outlet' ? 'pathEndsOutlet' : 'pathEndsNoWay')}
      </p>
      <ol class="legs" aria-label=${say('legs')}>
        ${path.legs.map(
          (leg, i) => html`<li class=${i < shown ? nothing : 'later'}>${legLine(voice, leg, list)}</li>`,
        )}
      </ol>
      <div class="row screen-only">
        ${
          shown < path.legs.length
            ? html`<button type="button" @click=${onAll}>${say('legMore', { count: path.legs.length })}</button>`
            : nothing
        }
        <button type="button" @click=${onClear}>${say('clearPath')}</button>
      </div>
    </div>
  `;
}

function legLine(voice: Voice, leg: Leg, list: LegList): TemplateResult {
  const { say, measures } = voice;
  const number = leg.pond === null ? null : list.numberOf(leg.pond);
  const way =
    leg.kind === 'pond'
      ? number === null
        ? say('legSmallPond')
        : say('legPond', { number })
      : say(leg.kind === 'culvert' ? 'legCulvert' : 'legLand');
  const change =
    leg.kind === 'pond'
      ? say('legHolds', { storage: storage(voice, leg.storageM3) })
      : leg.dropM === 0
        ? say('legLevel')
        : say('legDrop', { drop: measures.elevation(leg.dropM) });
  return html`
    <button
      type="button"
      class="leg ${leg.leg === list.leg ? 'pointed' : ''}"
      @pointerenter=${() => list.onPoint(leg.leg)}
      @pointerleave=${() => list.onPoint(null)}
      @focus=${() => list.onPoint(leg.leg)}
      @blur=${() => list.onPoint(null)}
      @click=${() => list.onShow(leg.leg)}
    >
      <span class="number">${leg.leg}</span>
      ${legStroke(leg.kind)}
      <span>${way}</span>
      <span class="figures">${measures.length(leg.lengthM)}, ${change}</span>
    </button>
  `;
}

/** Less than what a puddle holds is told as that, since its figures would say more than the terrain does. */
function storage({ say, measures }: Voice, m3: number): string {
  const least = measures.system === 'us' ? 10 * footM ** 3 : 1;
  return m3 > 0 && m3 < least ? say('lessThan', { value: measures.volume(least) }) : measures.volume(m3);
}

/** The line by which a leg is drawn on the map. */
export function legStroke(kind: Leg['kind']): TemplateResult {
  const dash = { land: nothing, pond: '9 6', culvert: '3 4' }[kind];
  return html`
    <svg width="36" height="12" aria-hidden="true">
      <line class="stroke" x1="2" y1="6" x2="34" y2="6" stroke-dasharray=${dash} />
    </svg>
  `;
}
