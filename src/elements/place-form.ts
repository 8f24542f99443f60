import { html, nothing, type TemplateResult } from 'lit';
import { type Ref, ref } from 'lit/directives/ref.js';
import type { PlaceCrs } from './typed-place.ts';
import type { Voice } from './voice.ts';

interface PlaceForm {
  readonly crs: PlaceCrs;
  readonly terrainName: string;
  /** Null without a map. */
  readonly viewCode: string | null;
  readonly problem: string;
  readonly field: Ref<HTMLInputElement>;
  readonly onCrs: (crs: PlaceCrs) => void;
  readonly onTrace: (text: string) => void;
}

/** A coordinate to type, and what it is in. */
export function placeForm(
  { say }: Voice,
  { crs, terrainName, viewCode, problem, field, onCrs, onTrace }: PlaceForm,
): TemplateResult {
  const submit = (event: SubmitEvent): void => {
    event.preventDefault();
    onTrace(field.value?.value ?? '');
  };
  const choices: readonly (readonly [PlaceCrs, string])[] = [
    ['terrain', say('crsTerrain', { name: terrainName })],
    ...(viewCode === null ? [] : [['view', say('crsView', { name: viewCode })] as const]),
    ['lonLat', say('crsLonLat')],
  ];
  return html`
    <form class="stack screen-only" novalidate @submit=${submit}>
      <label class="label stacked" for="place">${say('typedPlace')}</label>
      <div class="row place">
        <input
          id="place"
          name="place"
          autocomplete="off"
          aria-invalid=${problem !== ''}
          aria-describedby=${problem === '' ? nothing : 'problem'}
          ${ref(field)}
        />
        <button type="submit">${say('trace')}</button>
      </div>
      <label class="row in">
        <span class="label">${say('typedCrs')}</span>
        <select
          name="crs"
          @change=${({ currentTarget }: Event) => onCrs((currentTarget as HTMLSelectElement).value as PlaceCrs)}
        >
          ${choices.map(
            ([value, label]) => html`<option value=${value} .selected=${value === crs}>${label}</option>`,
          )}
        </select>
      </label>
      ${problem === '' ? nothing : html`<p id="problem" role="alert" class="note">${problem}</p>`}
    </form>
  `;
}
