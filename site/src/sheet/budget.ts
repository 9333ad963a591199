// The uncertainty budget of one scale: a bar and a row for each term.

import { css, html } from "lit";
import type * as core from "../gen/contract";
import { say } from "../words/words";

export const budgetStyle = css`
  .scroll {
    overflow-x: auto;
  }
  table {
    width: 100%;
    border-collapse: collapse;
    font-size: 0.85rem;
  }
  th,
  td {
    padding: 0.25rem 0.5rem 0.25rem 0;
    text-align: left;
    vertical-align: top;
    border-top: 1px solid var(--line);
  }
  td.number {
    text-align: right;
    white-space: nowrap;
    font-variant-numeric: tabular-nums;
  }
  .bars {
    margin: 0.4rem 0;
  }
  .bars li {
    display: grid;
    grid-template-columns: 8.5rem 1fr 3rem;
    align-items: center;
    gap: 0.5rem;
    font-size: 0.85rem;
  }
  .bars svg {
    width: 100%;
    height: 0.8rem;
    background: var(--accent-soft);
  }
  .bars rect {
    height: 100%;
    fill: var(--accent);
  }
  .bars span:last-child {
    text-align: right;
    font-variant-numeric: tabular-nums;
  }
`;

export function budget(row: core.Row) {
  return html`${budgetBars(row)}
    <div class="scroll" tabindex="0" role="region" aria-label=${say("scale.budget", { scale: row.scale })}>${budgetTable(row)}</div>`;
}

export function budgetBars(row: core.Row) {
  return html`<ul class="bars" aria-label=${say("budget.bars", { scale: row.scale })}>
      ${row.terms.map(
        (term) => html`<li>
          <span>${say(`term.${term.name}`)}</span>
          <svg aria-hidden="true"><rect width="${term.share * 100}%" /></svg>
          <span>${say("budget.percent", { percent: term.share * 100 })}</span>
        </li>`,
      )}
    </ul>`;
}

export function budgetTable(row: core.Row) {
  return html`<table>
        <thead>
          <tr>
            <th scope="col">${say("budget.term")}</th>
            <th scope="col">${say("budget.standard")}</th>
            <th scope="col">${say("budget.dof")}</th>
            <th scope="col">${say("budget.sensitivity")}</th>
            <th scope="col">${say("budget.share", { scale: row.scale })}</th>
            <th scope="col">${say("budget.source")}</th>
          </tr>
        </thead>
        <tbody>
          ${row.terms.map(
            (term) => html`<tr>
              <th scope="row">${say(`term.${term.name}`)}</th>
              <td class="number">${say("budget.figure", { value: term.standard })} ${term.scale}</td>
              <td class="number">${term.dof === null ? "∞" : say("budget.dof.figure", { dof: term.dof })}</td>
              <td class="number">${say("budget.figure", { value: term.sensitivity })}</td>
              <td class="number">${say("budget.figure", { value: term.contribution })}</td>
              <td>${term.source}</td>
            </tr>`,
          )}
        </tbody>
      </table>`;
}
