// Go's own glue between a compiled program and its JavaScript host. The build
// program takes it from the Go that compiles the core, so both always fit.

declare module "wasm_exec" {}

/** Set as a global by the import of "wasm_exec". */
declare class Go {
  /** What the program imports from its host. */
  readonly importObject: WebAssembly.Imports;
  /** Runs the program; settles when it exits. */
  run(instance: WebAssembly.Instance): Promise<void>;
}
