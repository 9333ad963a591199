// The worker that holds the core: it loads the WebAssembly, then answers one
// question at a time.

import "wasm_exec";
import type { Call, Question, Report } from "./protocol";

declare const self: DedicatedWorkerGlobalScope & {
  strikebook?: { [call in Call]: (text?: string) => string | undefined };
};

function report(message: Report): void {
  self.postMessage(message);
}

/** Counts the bytes that arrive, and names the type that the browser needs to
 * compile while loading: not every server knows it. */
function counted(response: Response): Response {
  let loaded = 0;
  const counter = new TransformStream<Uint8Array, Uint8Array>({
    transform(chunk, controller) {
      loaded += chunk.byteLength;
      report({ kind: "progress", loaded });
      controller.enqueue(chunk);
    },
  });
  return new Response(response.body!.pipeThrough(counter), { headers: { "Content-Type": "application/wasm" } });
}

async function start(): Promise<void> {
  const response = await fetch(new URL(__WASM_URL__, self.location.href));
  if (!response.ok) throw new Error(`HTTP ${response.status}`);
  const go = new Go();
  const { instance } = await WebAssembly.instantiateStreaming(counted(response), go.importObject);
  // run returns when the core waits for questions; its promise settles only
  // when the core ends, and it never should.
  void go.run(instance).finally(() => report({ kind: "ended" }));
  if (!self.strikebook) throw new Error("the core did not start");
  report({ kind: "ready" });
}

self.onmessage = (event: MessageEvent<Question>) => {
  const { id, call, text } = event.data;
  const answer = text === undefined ? self.strikebook?.[call]() : self.strikebook?.[call](text);
  if (answer === undefined) report({ kind: "ended" }); // the program behind the function is gone
  else report({ kind: "answer", id, text: answer });
};

start().catch((error: unknown) => report({ kind: "failed", detail: String(error) }));
