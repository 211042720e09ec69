/** The WebAssembly kernel as one object, the same in Node, worker threads and browsers. */
import { KERNEL_SOURCES, KERNEL_WASM } from "./module";

/** What the module exports, see assembly/index.ts. Addresses and sizes are in bytes. */
export interface KernelExports {
  readonly memory: WebAssembly.Memory;
  place(
    slots: number,
    stride: number,
    context: number,
    bad: number,
    sum: number,
    tables: number,
    scratch: number,
  ): void;
  placeTerms(terms: number): void;
  runMersenne31(code: number, end: number): void;
  runMontgomery31(code: number, end: number): void;
  convertMontgomery31(at: number, factor: number, slots: number): void;
  runMersenne61(code: number, end: number): void;
  runReal(code: number, end: number): void;
  runComplex(code: number, end: number): void;
}

/** Hash of the sources that the kernel was built from. */
export const kernelSources = KERNEL_SOURCES;

const PAGE = 65536;

/** The first page belongs to the module. */
export const FIRST_ADDRESS = PAGE;

/** Thrown where WebAssembly with 128-bit vectors is missing; callers may then choose the plain evaluator, and say so. */
export class KernelUnavailable extends Error {
  constructor() {
    super(
      "this browser or Node version has no WebAssembly SIMD, which the fast evaluator needs; use a version from 2023 or later",
    );
  }
}

export class Kernel {
  readonly exports: KernelExports;

  constructor(module: WebAssembly.Module) {
    const instance = new WebAssembly.Instance(module, {
      env: {
        abort: () => {
          throw new Error("the kernel stopped: a tape that is not well formed");
        },
      },
    });
    this.exports = instance.exports as unknown as KernelExports;
  }

  /** The memory as bytes, at least up to `end`. Views made before are void when it grows. */
  memory(end: number): ArrayBuffer {
    const { memory } = this.exports;
    const missing = end - memory.buffer.byteLength;
    if (missing > 0) memory.grow(Math.ceil(missing / PAGE));
    return memory.buffer;
  }
}

let compiled: WebAssembly.Module | null = null;
let shared: Kernel | null = null;

/**
 * The kernel of this thread.
 * @throws KernelUnavailable where the module is refused
 */
export function loadKernel(): Kernel {
  if (shared === null) {
    if (compiled === null) {
      const bytes = Uint8Array.from(atob(KERNEL_WASM), (character) => character.charCodeAt(0));
      if (!WebAssembly.validate(bytes)) throw new KernelUnavailable();
      compiled = new WebAssembly.Module(bytes);
    }
    shared = new Kernel(compiled);
  }
  return shared;
}
