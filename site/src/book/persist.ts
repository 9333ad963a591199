// Whether the browser promises to keep the Book when it runs short of space.

import { name } from "../store";

const asked = `${name}asked to persist`;

/** Asks for the promise, once. */
export async function askToPersist(): Promise<void> {
  if (remembered(asked)) return;
  remember(asked, "yes");
  await navigator.storage?.persist?.().catch(() => false);
}

/** What the browser answers: "yes", "no", or "unknown" where it has no answer. */
export async function persists(): Promise<"yes" | "no" | "unknown"> {
  const answer = await navigator.storage?.persisted?.().catch(() => undefined);
  return answer === undefined ? "unknown" : answer ? "yes" : "no";
}

/** What was remembered under a key; "" where nothing is, or nothing can be. */
export function remembered(key: string): string {
  try {
    return localStorage.getItem(key) ?? "";
  } catch {
    return "";
  }
}

export function remember(key: string, value: string): void {
  try {
    localStorage.setItem(key, value);
  } catch {
    // It is asked for again.
  }
}
