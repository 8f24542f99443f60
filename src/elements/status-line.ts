import { css, html, nothing, type TemplateResult } from 'lit';
import { repeat } from 'lit/directives/repeat.js';
import { jobTitles } from './questions.ts';
import type { RunningJob } from './running.ts';
import type { SessionState } from './session.ts';
import type { Voice } from './voice.ts';

export const statusLook = css`
  section.status {
    position: sticky;
    inset-block-end: 0;
    z-index: 1;
    border: 1px solid var(--line);
    padding: 0.5rem 0.75rem;
    font-size: 0.8125rem;
  }
  .caution {
    padding: 0.5rem 0.75rem;
  }
  .job,
  .fault {
    margin-block-end: 0.5rem;
  }
  .job {
    display: grid;
    grid-template-columns: 1fr auto;
    gap: 0.25rem 0.75rem;
    align-items: center;
  }
  .job progress {
    grid-column: 1;
    width: 100%;
    height: 0.375rem;
    appearance: none;
    border: 0;
    background: var(--line);
    accent-color: var(--accent);
  }
  .job progress::-webkit-progress-bar {
    background: var(--line);
  }
  .job progress::-webkit-progress-value {
    background: var(--accent);
  }
  .job progress::-moz-progress-bar {
    background: var(--accent);
  }
  .job button {
    grid-column: 2;
    grid-row: 1 / span 2;
  }
  .fault {
    display: grid;
    grid-template-columns: 1fr auto;
    gap: 0.75rem;
    align-items: start;
    border-inline-start: 2px solid var(--accent);
    padding-inline-start: 0.5rem;
  }
  @media print {
    section.status {
      position: static;
    }
    .caution {
      break-inside: avoid;
    }
  }
`;

/** What runs, what went wrong, what was done last. */
export function statusLine(
  voice: Voice,
  state: SessionState,
  jobs: readonly RunningJob[],
  forget: (id: number) => void,
): TemplateResult {
  return html`
    ${repeat(
      jobs,
      ({ kind }) => kind,
      (job) => jobLine(voice, job),
    )}
    <div role="alert">
      ${repeat(
        state.faults,
        ({ id }) => id,
        ({ id, message }) => html`
          <p part="fault" class="fault">
            <span>${message}</span>
            <button type="button" aria-label=${voice.say('closeFault')} @click=${() => forget(id)}>
              ${voice.say('close')}
            </button>
          </p>
        `,
      )}
    </div>
    <p part="said" role="status">${state.said || (jobs.length > 0 ? nothing : voice.say('ready'))}</p>
  `;
}

function jobLine(voice: Voice, { kind, startedMs, progress, dismiss }: RunningJob): TemplateResult {
  const title = voice.say(jobTitles[kind]);
  const doing = progress?.doing ?? '';
  const elapsedMs = Date.now() - startedMs;
  const elapsed = voice.measures.duration(elapsedMs);
  const expectedMs = progress?.expectedMs ?? null;
  const time =
    expectedMs === null || expectedMs < elapsedMs
      ? voice.say('elapsed', { elapsed })
      : voice.say('elapsedOf', { elapsed, expected: voice.measures.duration(expectedMs) });
  return html`
    <div part="job" class="job">
      <span>${doing === '' ? title : voice.say('jobDoing', { title, doing })} · ${time}</span>
      <progress aria-label=${title} max="100" value=${progress?.percent ?? nothing}></progress>
      <button type="button" aria-label=${voice.say('cancelJob', { title })} @click=${dismiss}>
        ${voice.say('cancel')}
      </button>
    </div>
  `;
}
