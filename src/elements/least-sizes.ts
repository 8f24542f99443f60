import { css, html, type TemplateResult } from 'lit';
import { live } from 'lit/directives/live.js';
import type { LeastSizes } from './questions.ts';
import type { Voice } from './voice.ts';

export const leastSizesLook = css`
  .least {
    display: grid;
    grid-template-columns: repeat(3, minmax(0, 1fr));
    gap: 0.5rem;
  }
  .least legend {
    margin-block-end: 0.25rem;
  }
  .least label {
    display: block;
  }
  .typed {
    display: flex;
    align-items: center;
    gap: 0.25rem;
  }
  .typed input {
    width: 100%;
    min-width: 0;
  }
`;

const fields = [
  { name: 'depthM', size: 'depth', label: 'leastDepth' },
  { name: 'areaM2', size: 'area', label: 'leastArea' },
  { name: 'capacityM3', size: 'capacity', label: 'leastCapacity' },
] as const;

/** Number fields for least sizes, in the units of the reader. */
export function leastSizes(
  voice: Voice,
  least: LeastSizes,
  onChange: (least: LeastSizes) => void,
): TemplateResult {
  const { measures } = voice;
  return html`
    <fieldset class="screen-only">
      <legend>${voice.say('filters')}</legend>
      <div class="least">
        ${fields.map(({ name, size, label }) => {
          const unit = measures.fieldUnits[size];
          const change = ({ currentTarget }: Event): void => {
            const input = currentTarget as HTMLInputElement;
            const value = Number(input.value.trim() === '' ? '0' : input.value.replace(',', '.'));
            const isFit = Number.isFinite(value) && value >= 0;
            input.setCustomValidity(isFit ? '' : voice.say('badNumber', { value: input.value }));
            input.setAttribute('aria-invalid', String(!isFit));
            input.reportValidity();
            if (isFit) onChange({ ...least, [name]: value * unit.size });
          };
          return html`
            <label>
              <span class="label">${voice.say(label)}</span>
              <span class="typed">
                <input
                  type="text"
                  inputmode="decimal"
                  autocomplete="off"
                  name=${size}
                  .value=${live(String(Number((least[name] / unit.size).toPrecision(6))))}
                  @change=${change}
                />
                <span class="small unit">${unit.symbol}</span>
              </span>
            </label>
          `;
        })}
      </div>
    </fieldset>
  `;
}
