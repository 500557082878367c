/** What the Node types leave out: the compiled modules that are handed to shared/measure. */
declare namespace WebAssembly {
  class Module {
    constructor(bytes: ArrayBuffer | ArrayBufferView);
  }
}
