import { css, html, nothing, type TemplateResult } from 'lit';
import type { MessageKey } from './messages.ts';
import type { Pond } from './ponds.ts';
import type { Voice } from './voice.ts';

/** As many as fit beside a map. */
export const pondsAPage = 8;

/** The page of the list on which a pond stands. */
export function pageWith({ number }: Pond): number {
  return Math.floor((number - 1) / pondsAPage);
}

export const pondListLook = css`
  .columns,
  .pond {
    display: grid;
    grid-template-columns: 2.75rem repeat(3, minmax(0, 1fr));
    column-gap: 0.5rem;
    padding-inline: 0.375rem;
  }
  .columns {
    color: var(--muted);
    font-size: 0.75rem;
    border-block-end: 1px solid var(--ink);
  }
  .columns > *,
  .pond > * {
    text-align: end;
    white-space: nowrap;
  }
  .columns > :first-child,
  .pond > :first-child {
    text-align: start;
  }
  .ponds {
    list-style: none;
  }
  .pond {
    font-size: 0.8125rem;
    line-height: 1.625rem;
    min-height: 1.625rem;
    border-block-end: 1px solid var(--line);
    cursor: pointer;
  }
  .pond:hover {
    background: var(--wash);
  }
  .pond[aria-selected='true'] {
    background: var(--wash);
    box-shadow: inset 3px 0 var(--accent);
    font-weight: 600;
  }
  .pond:focus-visible {
    outline-offset: -2px;
  }
  .pager {
    justify-content: space-between;
    margin-block-start: 0.375rem;
  }
  .pager button {
    min-width: 1.875rem;
  }
`;

interface PondList {
  readonly ponds: readonly Pond[];
  /** Ponds before this page. */
  readonly from: number;
  readonly count: number;
  readonly selected: string | null;
  readonly onSelect: (id: string) => void;
  readonly onPage: (step: -1 | 1) => void;
}

/** A page of ponds as a list box: one stop of the Tab key, arrows within, Page Up and Page Down between pages. */
export function pondList(voice: Voice, list: PondList): TemplateResult {
  const { ponds, from, count, selected } = list;
  const hasSelected = ponds.some(({ id }) => id === selected);
  const hasNext = from + pondsAPage < count;
  const to = Math.min(count, from + pondsAPage);
  return html`
    <div part="list">
      <div class="columns" aria-hidden="true">
        <span>${voice.say('columnNumber')}</span>
        <span>${voice.say('columnCapacity')}</span>
        <span>${voice.say('columnArea')}</span>
        <span>${voice.say('columnDepth')}</span>
      </div>
      <ul
        class="ponds"
        role="listbox"
        aria-label=${voice.say('pondList')}
        @keydown=${(event: KeyboardEvent) => onKey(event, list, hasNext)}
      >
        ${ponds.map((pond, i) =>
          option(voice, pond, {
            count,
            isSelected: pond.id === selected,
            isStop: hasSelected ? pond.id === selected : i === 0,
            onSelect: list.onSelect,
          }),
        )}
      </ul>
      ${
        count <= pondsAPage
          ? nothing
          : html`
              <div class="row pager screen-only">
                <button
                  type="button"
                  aria-label=${voice.say('previousPage')}
                  ?disabled=${from === 0}
                  @click=${() => list.onPage(-1)}
                >
                  ←
                </button>
                <span class="small">${voice.say('pageOf', { from: from + 1, to, count })}</span>
                <button
                  type="button"
                  aria-label=${voice.say('nextPage')}
                  ?disabled=${!hasNext}
                  @click=${() => list.onPage(1)}
                >
                  →
                </button>
              </div>
            `
      }
    </div>
  `;
}

interface Option {
  readonly count: number;
  readonly isSelected: boolean;
  readonly isStop: boolean;
  readonly onSelect: (id: string) => void;
}

function option({ say, measures }: Voice, pond: Pond, { count, isSelected, isStop, onSelect }: Option) {
  const { id, number } = pond;
  // Each figure carries the head of its column for those who do not see the columns.
  const cell = (head: MessageKey, figure: string): TemplateResult =>
    html`<span><span class="unseen">${say(head)} </span>${figure}</span>`;
  return html`
    <li
      class="pond"
      role="option"
      tabindex=${isStop ? 0 : -1}
      aria-selected=${isSelected}
      aria-posinset=${number}
      aria-setsize=${count}
      data-pond=${id}
      @click=${() => onSelect(id)}
    >
      ${cell('columnNumber', measures.count(number))} ${cell('columnCapacity', measures.volume(pond.capacityM3))}
      ${cell('columnArea', measures.area(pond.areaM2))} ${cell('columnDepth', measures.depth(pond.depthM))}
    </li>
  `;
}

function onKey(event: KeyboardEvent, { ponds, from, onSelect, onPage }: PondList, hasNext: boolean): void {
  const options = [...(event.currentTarget as HTMLElement).querySelectorAll<HTMLElement>('.pond')];
  const at = options.indexOf(event.target as HTMLElement);
  const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: options.length - 1 }[event.key];
  if (to !== undefined) options[Math.min(options.length - 1, Math.max(0, to))]?.focus();
  else if (event.key === 'Enter' || event.key === ' ') onSelect(ponds[at]?.id ?? '');
  else if (event.key === 'PageDown' && hasNext) onPage(1);
  else if (event.key === 'PageUp' && from > 0) onPage(-1);
  else return;
  event.preventDefault();
}
