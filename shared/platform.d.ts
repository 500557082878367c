/**
 * What every platform we run on has (browsers, workers, Node.js), declared by hand because
 * shared/ is compiled with neither DOM nor Node types. Add only what all of them provide.
 */

interface AbortSignal {
  readonly aborted: boolean;
  readonly reason: unknown;
  throwIfAborted(): void;
  addEventListener(type: 'abort', listener: () => void, options?: { once?: boolean }): void;
  removeEventListener(type: 'abort', listener: () => void): void;
}

interface TextDecodeOptions {
  stream?: boolean;
}

declare class TextDecoder {
  constructor(label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean });
  decode(input?: ArrayBufferView | ArrayBuffer, options?: TextDecodeOptions): string;
}

declare class TextEncoder {
  encode(input?: string): Uint8Array<ArrayBuffer>;
}

declare namespace WebAssembly {
  class Memory {
    constructor(descriptor: { initial: number; maximum?: number });
    readonly buffer: ArrayBuffer;
    grow(pages: number): number;
  }
  class Module {
    constructor(bytes: ArrayBuffer | ArrayBufferView);
  }
  class Instance {
    constructor(module: Module, imports?: Record<string, Record<string, unknown>>);
    readonly exports: Record<string, unknown>;
  }
}

interface SubtleDigest {
  digest(algorithm: 'SHA-256', data: ArrayBuffer | ArrayBufferView): Promise<ArrayBuffer>;
}

declare const crypto: { readonly subtle: SubtleDigest };

/** Both ends of a compression stream, as far as they are used. */
declare class DecompressionStream {
  constructor(format: 'deflate-raw');
  readonly writable: {
    getWriter(): {
      write(bytes: Uint8Array): Promise<void>;
      close(): Promise<void>;
      abort(reason?: unknown): Promise<void>;
    };
  };
  readonly readable: {
    getReader(): {
      read(): Promise<{ done: boolean; value?: Uint8Array }>;
      cancel(reason?: unknown): Promise<void>;
    };
  };
}
