// A part of the sheet that can be folded away: its summary says how it stands.

import { css, html, type TemplateResult } from "lit";

export const foldStyle = css`
  details.fold {
    background: var(--card);
    border: 1px solid var(--line);
    border-radius: var(--round);
    padding: 0 var(--gap);
  }
  details.fold[open] {
    padding-bottom: var(--gap);
  }
  details.fold > summary {
    gap: 0.6rem;
    padding: 0.4rem 0;
    color: var(--ink);
  }
  details.fold > summary h2 {
    margin: 0;
    flex: none;
  }
  details.fold > summary span {
    flex: 1;
    text-align: right;
    color: var(--soft);
    font-size: 0.9rem;
  }
  details.fold > summary span.bad {
    color: var(--stop);
    font-weight: 600;
  }
  .pair {
    display: grid;
    grid-template-columns: repeat(auto-fit, minmax(8.5rem, 1fr));
    gap: 0 0.5rem;
    align-items: end;
  }
`;

export function fold(title: string, state: string, bad: boolean, content: TemplateResult): TemplateResult {
  return html`<details class="fold">
    <summary><h2>${title}</h2><span class=${bad ? "bad" : ""}>${state}</span></summary>
    ${content}
  </details>`;
}
