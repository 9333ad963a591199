// The picture of an own curve: the pairs with both uncertainties, the curve
// with its band, the built-in model beside it, and the residuals below.

import { LitElement, css, html, svg } from "lit";
import { customElement, property } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { axis, path, type Axis } from "../look/axis";
import { look } from "../look/look";
import { say } from "../words/words";

const width = 640;
const height = 360;
const below = 110;
const left = 52;
const bottom = 30;

@customElement("strike-plot")
export class PlotElement extends LitElement {
  static override styles = [
    look,
    css`
      svg {
        width: 100%;
        height: auto;
        font: 13px system-ui, sans-serif;
        fill: var(--ink);
      }
      .axis {
        stroke: var(--edge);
        fill: none;
      }
      .grid {
        stroke: var(--line);
      }
      .band {
        fill: var(--accent-soft);
        stroke: none;
      }
      .curve {
        fill: none;
        stroke: var(--accent);
        stroke-width: 2.5;
      }
      .model {
        fill: none;
        stroke: var(--soft);
        stroke-width: 1.5;
        stroke-dasharray: 6 4;
      }
      .bar {
        stroke: var(--ink);
        stroke-width: 1.5;
      }
      circle {
        fill: var(--ink);
      }
    `,
  ];
  @property({ attribute: false }) fit!: core.Fitted;

  override render() {
    const { plot, residuals, scale } = this.fit;
    const bars = residuals.map((r) => ({ hl: r.hlBar, value: r.valueBar }));
    const ys = [...plot.flatMap((p) => [p.low, p.high, p.model ?? p.low]), ...bars.flatMap((bar) => bar.value)];
    const xs = [...plot.map((p) => p.hl), ...bars.flatMap((bar) => bar.hl)];
    const x = axis(Math.min(...xs), Math.max(...xs), left, width - 10, 6);
    const y = axis(Math.min(...ys), Math.max(...ys), height - bottom, 10);
    const band: [number, number][] = [
      ...plot.map((p): [number, number] => [x(p.hl), y(p.high)]),
      ...[...plot].reverse().map((p): [number, number] => [x(p.hl), y(p.low)]),
    ];
    const model = plot.filter((p) => p.model !== null).map((p): [number, number] => [x(p.hl), y(p.model!)]);
    return html`<svg viewBox="0 0 ${width} ${height + below}" role="img" aria-label=${this.told()}>
        ${frame(x, y, scale)}
        <path class="band" d=${path(band) + "Z"} />
        <path class="model" d=${path(model)} />
        <path class="curve" d=${path(plot.map((p) => [x(p.hl), y(p.value)]))} />
        ${bars.map((bar) => cross(x, y, bar))} ${this.residuals(x)}
      </svg>
      <p class="soft">${say("plot.legend")}</p>`;
  }

  /** What the picture shows, for those who do not see it. */
  private told(): string {
    const { pairs, scale, shownRange } = this.fit;
    return say("plot.told", { n: pairs.length, scale, lo: shownRange[0]!, hi: shownRange[1]! });
  }

  private residuals(x: Axis) {
    const found = this.fit.residuals.filter((r) => r.residual !== null && r.standard !== null);
    if (found.length === 0) return "";
    const most = Math.max(...found.map((r) => Math.abs(r.residual!) + r.standard!), 1e-9);
    const y = axis(-most, most, height + below - 5, height + 25, 2);
    return svg`<line class="axis" x1=${left} x2=${width - 10} y1=${y(0)} y2=${y(0)} />
      <text x="4" y=${height + 18}>${say("plot.residuals")}</text>
      ${found.map((r) => {
        const at = x((r.hlBar[0]! + r.hlBar[1]!) / 2);
        return svg`<line class="bar" x1=${at} x2=${at} y1=${y(r.residual! - r.standard!)} y2=${y(r.residual! + r.standard!)} /><circle cx=${at} cy=${y(r.residual!)} r="3.5" />`;
      })}`;
  }
}

function frame(x: Axis, y: Axis, scale: string) {
  return svg`${x.marks.map((mark) => svg`<line class="grid" x1=${x(mark)} x2=${x(mark)} y1="10" y2=${height - bottom} /><text x=${x(mark)} y=${height - bottom + 16} text-anchor="middle">${mark}</text>`)}
    ${y.marks.map((mark) => svg`<line class="grid" x1=${left} x2=${width - 10} y1=${y(mark)} y2=${y(mark)} /><text x=${left - 6} y=${y(mark) + 4} text-anchor="end">${mark}</text>`)}
    <text x="4" y="14">${scale}</text>`;
}

/** A pair with the intervals of both its coordinates. */
function cross(x: Axis, y: Axis, bar: { hl: number[]; value: number[] }) {
  const [left, right] = [x(bar.hl[0]!), x(bar.hl[1]!)];
  const [low, high] = [y(bar.value[0]!), y(bar.value[1]!)];
  const [cx, cy] = [(left + right) / 2, (low + high) / 2];
  return svg`<line class="bar" x1=${left} x2=${right} y1=${cy} y2=${cy} />
    <line class="bar" x1=${cx} x2=${cx} y1=${low} y2=${high} />
    <circle cx=${cx} cy=${cy} r="4" />`;
}
