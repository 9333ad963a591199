// What the page always says.

import { LitElement, css, html } from "lit";
import { customElement } from "lit/decorators.js";
import { catalogue } from "../gen/catalogue";
import { look } from "../look/look";
import { say } from "../words/words";

@customElement("strike-cautions")
export class CautionsElement extends LitElement {
  static override styles = [
    look,
    css`
      ul {
        margin: 0;
        padding-left: 1.2rem;
      }
    `,
  ];

  override render() {
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("cautions.title")}</h2>
      <ul>
        ${["estimate", "authority", "surface", "permit", "memory"].map((key) => html`<li>${say(`cautions.${key}`)}</li>`)}
      </ul>
      <p class="soft">${say("app.edition", { edition: catalogue.edition, build: __BUILD__ })}</p>
    </section>`;
  }
}
