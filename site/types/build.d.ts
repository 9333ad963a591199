// The names that the build program fills in when it bundles (build/page).

/** Name of the worker script, relative to the page. */
declare const __WORKER_URL__: string;

/** Name of the compiled core, relative to the page. */
declare const __WASM_URL__: string;

/** Size of the compiled core in bytes, before any compression on the way. */
declare const __WASM_BYTES__: number;

/** Short hash of everything that makes up the page. */
declare const __BUILD__: string;
