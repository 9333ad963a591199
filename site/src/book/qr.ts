// A link as a QR code that a phone can read off a screen or a page.

import { svg, html, type TemplateResult } from "lit";
import { encode } from "uqr";
import { say } from "../words/words";

/** The largest code that still reads well off a phone: 137 modules wide. */
const maxVersion = 30;

/** How many bytes it holds at the lowest level of correction (ISO/IEC 18004,
 * from memory). */
const maxBytes = 1732;

/** The code of a link; undefined where it does not fit. */
export function qr(link: string): TemplateResult | undefined {
  if (link.length > maxBytes) return undefined;
  // Always dark on light, with the quiet border that readers look for.
  const { data, size } = encode(link, { ecc: "L", border: 4, maxVersion });
  return html`<svg class="qr" role="img" aria-label=${say("qr.label")} viewBox="0 0 ${size} ${size}" shape-rendering="crispEdges">
    ${svg`<rect width=${size} height=${size} fill="#fff" /><path fill="#000" d=${modules(data)} />`}
  </svg>`;
}

function modules(rows: boolean[][]): string {
  return rows.flatMap((row, y) => row.map((dark, x) => (dark ? `M${x} ${y}h1v1h-1z` : ""))).join("");
}
