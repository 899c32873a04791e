/*
 * The part of the WebAssembly interface that we use. The engine is compiled without the types of any host, and
 * every host has it.
 */

export interface WasmMemory {
  readonly buffer: SharedArrayBuffer;
  /** by so many pages; gives the number before */
  grow(pages: number): number;
}

export interface WasmModule {
  readonly kind?: 'WebAssembly.Module';
}

interface WasmInstance {
  readonly exports: unknown;
}

interface WebAssemblyInterface {
  readonly Memory: new (size: { initial: number; maximum: number; shared: true }) => WasmMemory;
  readonly Module: new (code: Uint8Array) => WasmModule;
  readonly Instance: new (module: WasmModule, imports: { env: { memory: WasmMemory } }) => WasmInstance;
  validate(code: Uint8Array): boolean;
}

export const webAssembly = (globalThis as unknown as { readonly WebAssembly: WebAssemblyInterface })
  .WebAssembly;

export const PAGE_BYTES = 65536;
/** A module addresses 4 GiB. */
export const MOST_PAGES = 65536;
