/** What the kernel needs of the platform, the same in browsers, workers and Node; sim-core knows no other of their names. */
declare namespace WebAssembly {
  class Module {
    constructor(bytes: Uint8Array);
  }
  class Instance {
    readonly exports: unknown;
    constructor(module: Module);
  }
}
declare function atob(base64: string): string;
