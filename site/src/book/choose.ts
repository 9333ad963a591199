// Which spots of a job are shown, and in which order.

import type * as core from "../gen/contract";
import type { Spot } from "../store";

export const zones: core.Zone[] = ["base", "haz", "weld", "other"];

/** The outcomes, the one to look at first first. */
export const outcomes: core.Outcome[] = ["does-not-conform", "not-proven", "cannot-say", "conforms", "no-limit"];

export const orders = ["taken", "label", "worst"] as const;

export interface Choice {
  /** in the label; "" for all, and so with the next two */
  text: string;
  zone: string;
  outcome: string;
  order: string;
}

export const usualChoice: Choice = { text: "", zone: "", outcome: "", order: "taken" };

type RowOf = (spot: Spot) => core.BookRow | undefined;

export function select(spots: Spot[], choice: Choice, rowOf: RowOf): Spot[] {
  const text = choice.text.trim().toLocaleLowerCase();
  return spots.filter((spot) => {
    const { label = "", zone } = spot.kept.record;
    return (
      (!text || label.toLocaleLowerCase().includes(text)) &&
      (!choice.zone || zone === choice.zone) &&
      (!choice.outcome || rowOf(spot)?.outcome === choice.outcome)
    );
  });
}

/** Puts spots in order; equal ones stay in that of the job. */
export function inOrder(spots: Spot[], order: string, rowOf: RowOf): Spot[] {
  const collator = new Intl.Collator(undefined, { numeric: true });
  const label = (spot: Spot): string => spot.kept.record.label ?? "";
  const taken = (spot: Spot): string => spot.kept.record.taken ?? "~"; // those without come last
  const worst = (spot: Spot): number => {
    const row = rowOf(spot);
    return row ? outcomes.indexOf(row.outcome) : outcomes.length;
  };
  const margin = (spot: Spot): number => rowOf(spot)?.margin ?? Infinity;
  const compare: { [order: string]: (a: Spot, b: Spot) => number } = {
    taken: (a, b) => (taken(a) < taken(b) ? -1 : taken(a) > taken(b) ? 1 : 0),
    label: (a, b) => collator.compare(label(a), label(b)),
    worst: (a, b) => worst(a) - worst(b) || (margin(a) === margin(b) ? 0 : margin(a) - margin(b)),
  };
  return [...spots].sort(compare[order]);
}
