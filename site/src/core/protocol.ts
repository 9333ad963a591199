// What the page and the worker that holds the core say to each other. One
// question has one answer with the same id; the core's own errors are answers.

/** The functions of the core, by name: text in, text out. */
export type Call = "evaluate" | "goNoGo" | "moreReadings" | "fitCurve" | "encodeLink" | "decodeLink" | "catalogue" | "evaluateRows" | "summarizeRows" | "readTable" | "writeTable";

/** The page asks. */
export interface Question {
  id: number;
  call: Call;
  /** what the function takes; absent where it takes nothing */
  text?: string;
}

/** The worker reports or answers. */
export type Report =
  | { kind: "progress"; loaded: number }
  | { kind: "ready" }
  /** the core could not be loaded; detail is the browser's own words */
  | { kind: "failed"; detail: string }
  /** the core has ended and will answer no more */
  | { kind: "ended" }
  | { kind: "answer"; id: number; text: string };
