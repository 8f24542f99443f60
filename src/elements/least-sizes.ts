import { css, html, nothing, type TemplateResult } from 'lit';
import type { LeastSizes } from './questions.ts';
import { fieldNumber, numberSigns, typedNumber } from './typed-number.ts';
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

/** What is wrong with what was typed, by size. */
export type LeastProblems = Readonly<Partial<Record<keyof LeastSizes, string>>>;

interface LeastForm {
  readonly least: LeastSizes;
  readonly problems: LeastProblems;
  readonly onChange: (least: LeastSizes, problems: LeastProblems) => void;
}

/** Number fields for least sizes, in the units of the reader and the signs of the language. */
export function leastSizes(voice: Voice, { least, problems, onChange }: LeastForm): TemplateResult {
  const { measures } = voice;
  const { lang } = measures;
  return html`
    <fieldset class="screen-only">
      <legend>${voice.say('filters')}</legend>
      <div class="least">
        ${fields.map(({ name, size, label }) => {
          const unit = measures.fieldUnits[size];
          const change = ({ currentTarget }: Event): void => {
            const input = currentTarget as HTMLInputElement;
            const value = input.value.trim() === '' ? 0 : typedNumber(input.value, lang);
            if (value !== null) {
              onChange({ ...least, [name]: value * unit.size }, { ...problems, [name]: '' });
              return;
            }
            const values = {
              value: input.value,
              example: fieldNumber(0.1, lang),
              decimal: numberSigns(lang).decimal,
            };
            onChange(least, { ...problems, [name]: voice.say('badNumber', values) });
          };
          const problem = problems[name] ?? '';
          const shown = least[name] / unit.size;
          return html`
            <label>
              <span class="label">${voice.say(label)}</span>
              <span class="typed">
                <input
                  type="text"
                  inputmode="decimal"
                  autocomplete="off"
                  name=${size}
                  aria-invalid=${problem !== ''}
                  aria-describedby=${problem === '' ? nothing : `problem-${size}`}
                  .value=${Number.isFinite(shown) ? fieldNumber(shown, lang) : ''}
                  @change=${change}
                />
                <span class="small unit">${unit.symbol}</span>
              </span>
            </label>
          `;
        })}
      </div>
      ${fields.map(({ name, size }) =>
        problems[name]
          ? html`<p id="problem-${size}" role="alert" class="note">${problems[name]}</p>`
          : nothing,
      )}
    </fieldset>
  `;
}
