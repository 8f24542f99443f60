import { html, type TemplateResult } from 'lit';
import type { MessageKey } from './messages.ts';
import type { Voice } from './voice.ts';

/** Vertical units as the process inputs name them. */
const units: readonly (readonly [string, MessageKey])[] = [
  ['m', 'unitM'],
  ['ft', 'unitFt'],
  ['us-ft', 'unitUsFt'],
];

/** Asks for the vertical unit; none is proposed, since a guess would go unseen. */
export function unitQuestion(
  voice: Voice,
  names: readonly string[],
  answer: (unit: string) => void,
): TemplateResult {
  const submit = (event: SubmitEvent): void => {
    event.preventDefault();
    const unit = new FormData(event.currentTarget as HTMLFormElement).get('unit');
    if (typeof unit === 'string') answer(unit);
  };
  return html`
    <form class="note stack" @submit=${submit}>
      <fieldset class="stack" aria-describedby="unit-why">
        <legend><b>${voice.say('unitQuestion')}</b></legend>
        <p id="unit-why" class="small">${names.join(', ')}: ${voice.say('unitWhy')}</p>
        ${units.map(
          ([value, key]) => html`
            <label class="row option"><input type="radio" name="unit" value=${value} required />${voice.say(key)}</label>
          `,
        )}
      </fieldset>
      <button type="submit" class="main">${voice.say('useUnit')}</button>
    </form>
  `;
}

/** The vertical unit in use, to change. */
export function unitChoice(voice: Voice, unit: string, answer: (unit: string) => void): TemplateResult {
  const change = ({ currentTarget }: Event): void => {
    const select = currentTarget as HTMLSelectElement;
    const { value } = select;
    // The unit in use stays shown until the terrain is surveyed in the new one.
    select.value = unit;
    answer(value);
  };
  return html`
    <select aria-label=${voice.say('unit')} @change=${change}>
      ${units.map(([value, key]) => html`<option value=${value} .selected=${value === unit}>${voice.say(key)}</option>`)}
    </select>
  `;
}
