import { decodeBase64 } from './base64';
import type { KernelMemory } from './kernel-memory';
import { type WasmMemory, type WasmModule, webAssembly } from './web-assembly';

/**
 * A compiled kernel file: gives its functions on a memory. Compiled once a thread, instantiated once a memory.
 *
 * @param code - one of the strings of `compiled/`; `Functions` are the exports of the file in `assembly/`
 */
export function kernelModule<Functions extends object>(code: string): (memory: KernelMemory) => Functions {
  let module: WasmModule | undefined;
  const instances = new WeakMap<WasmMemory, Functions>();
  return ({ wasm }) => {
    const known = instances.get(wasm);
    if (known) return known;
    module ??= new webAssembly.Module(decodeBase64(code));
    const instance = new webAssembly.Instance(module, { env: { memory: wasm } });
    const functions = instance.exports as Functions;
    instances.set(wasm, functions);
    return functions;
  };
}
