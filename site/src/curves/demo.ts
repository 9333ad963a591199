// An invented example: offcuts of turbine bolts, measured in a laboratory, then
// with a rebound instrument on site.

import type * as core from "../gen/contract";

export const demo: core.Definition = {
  name: "Demo: bolt offcuts, Tarn Ridge",
  kind: "own",
  device: "D",
  group: "low-alloy-steel",
  scale: "HBW",
  source: "Invented demonstration data: laboratory sheet 7, eight offcuts",
  serial: "",
  date: "2026-09-14",
  pairs: [
    { hl: 468.4, u_hl: 2.2, value: 190, u_value: 2 },
    { hl: 489.1, u_hl: 1.9, value: 207, u_value: 2 },
    { hl: 507.6, u_hl: 2.4, value: 224, u_value: 2.5 },
    { hl: 528.9, u_hl: 2.1, value: 243, u_value: 2.5 },
    { hl: 548.2, u_hl: 2.6, value: 263, u_value: 2.5 },
    { hl: 569.7, u_hl: 2, value: 284, u_value: 3 },
    { hl: 590.3, u_hl: 2.3, value: 307, u_value: 3 },
    { hl: 611.8, u_hl: 2.5, value: 330, u_value: 3.5 },
  ],
};
