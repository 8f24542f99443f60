import { css } from 'lit';

/** The drawing office: thin lines, one accent, figures in columns. Defaults of the tokens of styles/tokens.css. */
export const look = css`
  :host {
    display: block;
    font-family: var(--brim-font, inherit);
    font-size: var(--brim-font-size, 0.875rem);
    line-height: 1.45;
  }
  :host([hidden]) {
    display: none;
  }
  *,
  *::before,
  *::after {
    box-sizing: border-box;
  }
  .card {
    --ink: var(--brim-ink, #22272b);
    --muted: var(--brim-muted, #5a6166);
    --line: var(--brim-line, #d5d2c8);
    --edge: var(--brim-edge, #7d8285);
    --paper: var(--brim-paper, #fbfaf6);
    --field: var(--brim-field, #ffffff);
    --accent: var(--brim-accent, #b02c16);
    --on-accent: var(--brim-on-accent, #ffffff);
    --wash: var(--brim-wash, #f1eee5);
    --space: var(--brim-space, 0.75rem);
    --radius: var(--brim-radius, 2px);
    color: var(--ink);
    background: var(--paper);
    color-scheme: light;
    font-variant-numeric: tabular-nums;
    text-align: start;
    overflow-wrap: anywhere;
  }
  .card.dark {
    --ink: var(--brim-ink, #e9e6df);
    --muted: var(--brim-muted, #a9aeb1);
    --line: var(--brim-line, #3b4044);
    --edge: var(--brim-edge, #81878b);
    --paper: var(--brim-paper, #1c1f22);
    --field: var(--brim-field, #14171a);
    --accent: var(--brim-accent, #ff9a78);
    --on-accent: var(--brim-on-accent, #1c1f22);
    --wash: var(--brim-wash, #262a2e);
    color-scheme: dark;
  }
  section.card {
    border: 1px solid var(--line);
    border-top: 2px solid var(--ink);
    border-radius: 0 0 var(--radius) var(--radius);
    padding: var(--space);
  }
  h2,
  h3,
  p,
  dl,
  dd,
  ol,
  ul {
    margin: 0;
    padding: 0;
  }
  h2 {
    font-size: 1rem;
    font-weight: 600;
    line-height: 1.25;
    letter-spacing: 0.005em;
  }
  h3 {
    font-size: 0.875rem;
    font-weight: 600;
  }
  h2 ~ *,
  .stack > * + * {
    margin-block-start: calc(var(--space) * 0.75);
  }
  slot {
    display: contents;
  }
  .hint,
  .small {
    color: var(--muted);
    font-size: 0.8125rem;
  }
  .lead {
    font-size: 0.9375rem;
  }
  .note {
    border-inline-start: 2px solid var(--accent);
    padding-inline-start: 0.5rem;
    font-size: 0.8125rem;
  }
  dl {
    display: grid;
    grid-template-columns: minmax(6.5rem, max-content) 1fr;
    column-gap: var(--space);
    font-size: 0.8125rem;
  }
  dt,
  dd {
    padding-block: 0.1875rem;
    border-block-end: 1px solid var(--line);
    min-width: 0;
  }
  dt {
    color: var(--muted);
    padding-inline-end: var(--space);
    margin-inline-end: calc(var(--space) * -1);
  }
  .unseen {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
    white-space: nowrap;
  }
  .unit {
    white-space: nowrap;
  }
  .row {
    display: flex;
    flex-wrap: wrap;
    gap: 0.5rem;
    align-items: center;
  }
  button,
  input,
  select {
    font: inherit;
    font-size: 0.8125rem;
    color: var(--ink);
    background: var(--field);
    border: 1px solid var(--edge);
    border-radius: var(--radius);
    min-height: 1.875rem;
    padding: 0.1875rem 0.5rem;
    max-width: 100%;
  }
  input[type='radio'] {
    min-height: 0;
    margin: 0 0.25rem;
    accent-color: var(--accent);
  }
  .option {
    min-height: 1.5rem;
    cursor: pointer;
  }
  fieldset > .option {
    margin-block-start: 0.25rem;
  }
  button {
    cursor: pointer;
    background: transparent;
  }
  button:hover:not(:disabled) {
    background: var(--wash);
  }
  button.main,
  button[aria-pressed='true'] {
    background: var(--accent);
    border-color: var(--accent);
    color: var(--on-accent);
  }
  button.main:hover:not(:disabled) {
    background: color-mix(in srgb, var(--accent) 88%, var(--ink));
  }
  button:disabled {
    cursor: default;
    color: var(--muted);
    border-style: dashed;
  }
  button.plain {
    border: 0;
    color: var(--accent);
    text-decoration: underline;
    text-underline-offset: 0.15em;
    padding-inline: 0.125rem;
    min-height: 1.5rem;
  }
  :focus-visible {
    outline: 2px solid var(--accent);
    outline-offset: 2px;
    /* The status line sticks to the bottom and must not hide what has the focus. */
    scroll-margin-block: 5rem;
  }
  fieldset {
    border: 0;
    margin-inline: 0;
    padding: 0;
    min-width: 0;
  }
  legend,
  .label {
    padding: 0;
    color: var(--muted);
    font-size: 0.8125rem;
  }
  [aria-invalid='true'] {
    border-color: var(--accent);
    border-width: 2px;
  }
  @media print {
    section.card {
      break-inside: avoid;
    }
    button,
    input,
    .screen-only {
      display: none;
    }
    button.plain {
      display: inline;
      color: inherit;
      text-decoration: none;
      padding: 0;
    }
    /* What is chosen is worth a word on paper, the box to choose from is not. */
    select {
      appearance: none;
      color: inherit;
      background: none;
      border: 0;
      padding: 0;
      min-height: 0;
    }
  }
`;
