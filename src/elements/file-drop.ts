import { css, html, nothing, type TemplateResult } from 'lit';
import type { Voice } from './voice.ts';

export const fileDropLook = css`
  .drop {
    border: 1px dashed var(--edge);
    border-radius: var(--radius);
    padding: 0.5rem;
  }
  .drop.over {
    border-color: var(--accent);
    border-style: solid;
    background: var(--wash);
  }
  .drop.empty {
    padding-block: 1rem;
    justify-content: center;
  }
`;

interface FileDrop {
  readonly isLoaded: boolean;
  readonly isOver: boolean;
  readonly onOver: (isOver: boolean) => void;
  readonly onFiles: (files: readonly File[]) => void;
}

/** A place to choose files or to drop them. */
export function fileDrop(voice: Voice, { isLoaded, isOver, onOver, onFiles }: FileDrop): TemplateResult {
  const choose = ({ currentTarget }: Event): void => {
    const input = (currentTarget as HTMLElement).parentElement?.querySelector('input');
    input?.click();
  };
  const chosen = ({ currentTarget }: Event): void => {
    const input = currentTarget as HTMLInputElement;
    onFiles([...(input.files ?? [])]);
    // The same file may be chosen again.
    input.value = '';
  };
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    onOver(false);
    onFiles([...(event.dataTransfer?.files ?? [])]);
  };
  const over = (event: DragEvent): void => {
    event.preventDefault();
    onOver(true);
  };
  return html`
    ${isLoaded ? nothing : html`<p part="hint" class="hint">${voice.say('terrainHint')}</p>`}
    <div
      part="drop"
      class="row screen-only drop ${isOver ? 'over' : ''} ${isLoaded ? '' : 'empty'}"
      @dragover=${over}
      @dragleave=${() => onOver(false)}
      @drop=${drop}
    >
      <button type="button" class=${isLoaded ? '' : 'main'} @click=${choose}>
        ${voice.say(isLoaded ? 'chooseOther' : 'chooseFiles')}
      </button>
      <input
        type="file"
        hidden
        multiple
        accept=".tif,.tiff,.gtiff,image/tiff"
        aria-label=${voice.say('chooseFiles')}
        @change=${chosen}
      />
      <span class="small">${voice.say('dropHere')}</span>
    </div>
  `;
}
