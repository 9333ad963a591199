// Looks up the words of the page and fills in their parameters.

import type * as core from "../gen/contract";
import { english } from "./en";

const language = "en";
const words: { [key: string]: string } = english;

/** The words of a key, with its parameters filled in: {name} stands for one,
 * {name:1} for a number with one decimal. The core's sentences are made so. */
export function say(key: string, params: core.Params = {}): string {
  const text = words[key];
  if (text === undefined) throw new Error(`no words for ${key}`);
  return text.replace(/\{(\w+)(?::(\d+))?\}/g, (_, name: string, places?: string) => {
    const value = params[name];
    if (typeof value !== "number") return String(value);
    const digits = places === undefined ? { maximumFractionDigits: 10 } : fixed(Number(places));
    return value.toLocaleString(language, { useGrouping: false, ...digits });
  });
}

function fixed(places: number): Intl.NumberFormatOptions {
  return { minimumFractionDigits: places, maximumFractionDigits: places };
}

/** The sentences of a finding, by its code and parameters. */
export function sayFinding(f: core.Finding): { message: string; remedy: string } {
  return { message: say(`core.${f.code}.message`, f.params), remedy: say(`core.${f.code}.remedy`, f.params) };
}

/** The sentence of a code of the core: a reason or an error. */
export function sayCode(code: string, params: core.Params): string {
  return say(`core.${code}.message`, params);
}
