// The picture of a traverse: hardness along a weld, each value with its
// uncertainty, and the limit.

import type * as core from "../gen/contract";
import { css, html, svg } from "lit";
import { axis, path } from "../look/axis";
import { say } from "../words/words";

export const traverseStyle = css`
  .plot {
    display: block;
    width: 100%;
    max-width: 44rem;
    font-size: 11px;
  }
  .plot text {
    fill: var(--ink);
  }
  .plot .grid {
    stroke: var(--line);
  }
  .plot .bar {
    stroke: var(--accent);
    stroke-width: 2;
  }
  .plot .line {
    fill: none;
    stroke: var(--accent);
    stroke-dasharray: 2 3;
  }
  .plot .limit {
    stroke: var(--stop);
    stroke-width: 1.5;
    stroke-dasharray: 7 3;
  }
  .plot .limit-text {
    fill: var(--stop);
    font-weight: 600;
  }
  .plot .dot {
    fill: var(--card);
    stroke: var(--accent);
    stroke-width: 2;
  }
  .plot .haz {
    fill: var(--accent);
  }
`;

type Measured = core.TraversePoint & { value: number; low: number; high: number };

const size = { width: 360, height: 230, left: 40, right: 8, top: 22, bottom: 36 };

export function traverse({ traverse: { points, min, max }, scale }: core.Summary) {
  const measured = points.filter((p): p is Measured => p.value !== null);
  if (measured.length < 2) return "";
  const bounds = [min, max].filter((v) => v !== null);
  const values = [...measured.flatMap((p) => [p.low, p.high]), ...bounds];
  const { width, height, left, right, top, bottom } = size;
  const y = axis(Math.min(...values), Math.max(...values), height - bottom, top);
  const x = axis(measured[0]!.position, measured.at(-1)!.position, left + 12, width - right - 12, 6);
  return html`<svg class="plot" role="img" viewBox="0 0 ${width} ${height}" aria-label=${say("traverse.label", { n: measured.length, scale })}>
    <text x="2" y="12">${scale}</text>
    ${y.marks.map((v) => svg`<line class="grid" x1=${left} x2=${width - right} y1=${y(v)} y2=${y(v)} /><text x=${left - 5} y=${y(v) + 4} text-anchor="end">${v}</text>`)}
    ${x.marks.map((v) => svg`<line class="grid" x1=${x(v)} x2=${x(v)} y1=${height - bottom} y2=${height - bottom + 4} /><text x=${x(v)} y=${height - bottom + 16} text-anchor="middle">${v}</text>`)}
    <text x=${(left + width - right) / 2} y=${height - 4} text-anchor="middle">${say("traverse.position")}</text>
    ${bounds.map((v) => svg`<line class="limit" x1=${left} x2=${width - right} y1=${y(v)} y2=${y(v)} /><text class="limit-text" x=${width - right} y=${y(v) - 4} text-anchor="end">${say("traverse.limit", { value: v, scale })}</text>`)}
    <path class="line" d=${path(measured.map((p) => [x(p.position), y(p.value)]))} />
    ${measured.map((p) => svg`<line class="bar" x1=${x(p.position)} x2=${x(p.position)} y1=${y(p.low)} y2=${y(p.high)} /><circle class="dot ${p.zone ?? ""}" cx=${x(p.position)} cy=${y(p.value)} r="4" />`)}
  </svg>
    <p class="soft">${say("traverse.key")}</p>`;
}

/** The same in words, for whoever cannot see the picture. */
export function traverseTable({ traverse: { points } }: core.Summary, label: (row: number) => string) {
  return html`<div class="scroll" tabindex="0" role="region" aria-label=${say("traverse.table")}>
    <table>
      <thead>
        <tr>
          <th scope="col">${say("traverse.position")}</th>
          <th scope="col">${say("traverse.spot")}</th>
          <th scope="col">${say("book.zone")}</th>
          <th scope="col">${say("traverse.value")}</th>
        </tr>
      </thead>
      <tbody>
        ${points.map(
          (p) => html`<tr>
            <td>${p.shownPosition}</td>
            <td>${label(p.index)}</td>
            <td>${p.zone ? say(`zone.${p.zone}`) : ""}</td>
            <td>${p.shown ? say("book.row.value", { value: p.shown, expanded: p.shownExpanded }) : say("book.row.none")}</td>
          </tr>`,
        )}
      </tbody>
    </table>
  </div>`;
}
