import { MOST_PAGES, PAGE_BYTES, type WasmMemory, webAssembly } from './web-assembly';

/** A row of numbers inside a kernel memory: its address for the kernels, its view for us. Not zeroed. */
export interface Block<View> {
  readonly address: number;
  readonly view: View;
}

/** Does not fit into the 4 GiB that a kernel can address. */
export class KernelMemoryFull extends Error {
  override readonly name = 'KernelMemoryFull';
}

/** For 128-bit loads, and so that two threads do not write into one cache line. */
const ALIGNMENT = 64;

/**
 * Memory that kernels work in. It is shared memory: several threads may run kernels on one, and views stay valid
 * when it grows. It is reserved at the first use, grows as needed up to 4 GiB and is given back as a whole, when nobody
 * refers to it any more.
 */
export class KernelMemory {
  #wasm: WasmMemory | undefined;
  // address 0 is left free, so that no block has it
  #top = ALIGNMENT;
  /** every growth makes a new one, of which views may be around */
  readonly #buffers = new WeakSet<SharedArrayBuffer>();

  /** @param wasm - memory of another thread to take part in; only that thread may then take blocks */
  constructor(wasm?: WasmMemory) {
    this.#wasm = wasm;
  }

  /** @throws KernelMemoryFull where the host has no addresses left for it */
  get wasm(): WasmMemory {
    if (!this.#wasm) {
      try {
        this.#wasm = new webAssembly.Memory({ initial: 1, maximum: MOST_PAGES, shared: true });
      } catch (error) {
        throw new KernelMemoryFull('no kernel memory is to be had', { cause: error });
      }
    }
    return this.#wasm;
  }

  /** @throws KernelMemoryFull */
  float64(length: number): Block<Float64Array> {
    const address = this.#take(8 * length);
    const { buffer } = this.wasm;
    this.#buffers.add(buffer);
    return { address, view: new Float64Array(buffer, address, length) };
  }

  /** The same, or nothing where it does not fit. */
  float64IfThereIsRoom(length: number): Block<Float64Array> | undefined {
    try {
      return this.float64(length);
    } catch (error) {
      if (error instanceof KernelMemoryFull) return undefined;
      throw error;
    }
  }

  /** @throws KernelMemoryFull */
  int32(length: number): Block<Int32Array> {
    const address = this.#take(4 * length);
    return { address, view: new Int32Array(this.wasm.buffer, address, length) };
  }

  /** Where numbers stand that are a block of this memory, or a part of one; undefined for others. */
  addressOf(view: Float64Array): number | undefined {
    return this.#buffers.has(view.buffer as SharedArrayBuffer) ? view.byteOffset : undefined;
  }

  /** Gives back all blocks that were taken while `work` ran. */
  scope<Result>(work: () => Result): Result {
    const mark = this.#top;
    try {
      return work();
    } finally {
      this.#top = mark;
    }
  }

  #take(bytes: number): number {
    const address = this.#top;
    const end = address + Math.ceil(bytes / ALIGNMENT) * ALIGNMENT;
    const missing = Math.ceil((end - this.wasm.buffer.byteLength) / PAGE_BYTES);
    if (missing > 0) {
      try {
        this.wasm.grow(missing);
      } catch (error) {
        throw new KernelMemoryFull(`${end} bytes of kernel memory are not to be had`, { cause: error });
      }
    }
    this.#top = end;
    return address;
  }
}

/** Copies numbers into a memory. @returns their address */
export function placeInt32(memory: KernelMemory, numbers: ArrayLike<number>): number {
  const block = memory.int32(Math.max(1, numbers.length));
  block.view.set(numbers);
  return block.address;
}

/** Copies numbers into a memory. @returns their address */
export function placeFloat64(memory: KernelMemory, numbers: ArrayLike<number>): number {
  const block = memory.float64(Math.max(1, numbers.length));
  block.view.set(numbers);
  return block.address;
}

let scratch: KernelMemory | undefined;
let tables: KernelMemory | undefined;

/** The memory of this thread for what lives no longer than one call; take blocks inside its `scope`. */
export function scratchMemory(): KernelMemory {
  scratch ??= new KernelMemory();
  return scratch;
}

/** The memory of this thread for tables of integrals, which stay at its bottom. */
export function tablesMemory(): KernelMemory {
  tables ??= new KernelMemory();
  return tables;
}
