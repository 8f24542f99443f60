import { css, html, nothing, type SVGTemplateResult, svg, type TemplateResult } from 'lit';

export const legendLook = css`
  .part li {
    display: flex;
    align-items: center;
    gap: 0.5rem;
  }
  .part ul {
    list-style: none;
    display: grid;
    gap: 0.125rem;
    font-size: 0.8125rem;
    padding-inline-start: 1.5rem;
  }
  .part li > span {
    min-width: 0;
  }
  .part svg {
    flex: none;
    display: block;
  }
  .part label {
    display: flex;
    align-items: center;
    gap: 0.5rem;
    min-height: 1.5rem;
    cursor: pointer;
  }
  input[type='checkbox'] {
    flex: none;
    width: 1rem;
    height: 1rem;
    min-height: 0;
    margin: 0;
    accent-color: var(--accent);
  }
  .read-out {
    min-height: 3em;
    border-block-end: 1px solid var(--line);
    padding-block-end: 0.375rem;
  }
`;

const framed = (content: SVGTemplateResult): TemplateResult => html`
  <svg width="32" height="18" viewBox="0 0 32 18" aria-hidden="true">${content}</svg>
`;

/** Marks as the map draws them, small. */
export const swatch = {
  area: (fill: string, edge: string) =>
    framed(svg`<rect x="2" y="2" width="28" height="14" fill=${fill} stroke=${edge} />`),
  relief: (lit: string, shadow: string) =>
    framed(svg`
      <path d="M2 16 16 3v13z" fill=${lit} stroke=${shadow} stroke-width="0.5" />
      <path d="M16 3 30 16H16z" fill=${shadow} />
    `),
  line: (colour: string, width: number, dash?: string) =>
    framed(svg`
      <path d="M2 9h28" fill="none" stroke=${colour} stroke-width=${width} stroke-dasharray=${dash ?? nothing} />
    `),
  pourPoint: (colour: string, rim: string) =>
    framed(svg`
      <path d="M14 3.5 25 9l-11 5.5z" fill=${colour} stroke=${rim} />
      <circle cx="11" cy="9" r="4" fill=${colour} stroke=${rim} stroke-width="1.5" />
    `),
  start: (colour: string, inside: string) =>
    framed(svg`<circle cx="16" cy="9" r="5" fill=${inside} stroke=${colour} stroke-width="2.5" />`),
  arrow: (colour: string, rim: string) =>
    framed(svg`<path d="M9 3 24 9 9 15z" fill=${colour} stroke=${rim} />`),
  cross: (colour: string) =>
    framed(svg`<path d="m10 3 12 12M22 3 10 15" fill="none" stroke=${colour} stroke-width="3" />`),
};
