// The verdict: in words first, in a mark and a colour that repeat them.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { say, sayCode } from "../words/words";

/** A mark that tells the outcomes apart without colour. */
export const marks: { [outcome in core.Outcome]: string } = {
  conforms: "✓",
  "does-not-conform": "✕",
  "not-proven": "?",
  "cannot-say": "–",
  "no-limit": "",
};

@customElement("strike-verdict")
export class VerdictElement extends LitElement {
  static override styles = [
    look,
    css`
      section {
        border-width: 2px;
      }
      h2 {
        display: flex;
        align-items: center;
        gap: 0.6rem;
        font-size: 1.5rem;
      }
      h2 span {
        flex: none;
        width: 2.2rem;
        height: 2.2rem;
        display: grid;
        place-items: center;
        border: 3px solid currentColor;
        border-radius: 50%;
        font-weight: 800;
      }
      .conforms {
        border-color: var(--go);
        background: var(--go-soft);
      }
      .conforms h2 {
        color: var(--go);
      }
      .does-not-conform {
        border-color: var(--stop);
        background: var(--stop-soft);
      }
      .does-not-conform h2 {
        color: var(--stop);
      }
      .not-proven {
        border-style: dashed;
        border-color: var(--warn);
        background: var(--warn-soft);
      }
      .not-proven h2 {
        color: var(--warn);
      }
      .cannot-say {
        border-style: dotted;
        border-color: var(--edge);
      }
      section p {
        color: var(--ink);
      }
      #advice {
        font-weight: 600;
      }
    `,
  ];
  @property({ attribute: false }) sheet: core.Sheet | undefined;

  override render() {
    const verdict = this.sheet?.verdict;
    if (!verdict || verdict.outcome === "no-limit") return "";
    return html`<section class=${verdict.outcome} aria-labelledby="title">
      <h2 id="title"><span aria-hidden="true">${marks[verdict.outcome]}</span>${say(`outcome.${verdict.outcome}`)}</h2>
      ${verdict.said.map(({ part, code, params }) => html`<p id=${part}>${sayCode(code, params)}</p>`)}
      ${verdict.probability === null
        ? ""
        : html`<p class="soft" id="probability">
            ${say("verdict.probability", { percent: verdict.shownChance })} ${say(`rule.${verdict.rule}`)}.
          </p>`}
    </section>`;
  }
}
