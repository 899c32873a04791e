import { describe, expect, it } from 'vitest';
import { KernelMemory, KernelMemoryFull, scratchMemory } from '../../../engine/kernels/kernel-memory';

describe('KernelMemory', () => {
  it('identity: blocks do not overlap, are aligned and none is at address 0', () => {
    const memory = new KernelMemory();
    const blocks = [memory.float64(3), memory.int32(5), memory.float64(1), memory.float64(100_000)];
    blocks.forEach(({ address, view }, k) => {
      expect(address).toBeGreaterThan(0);
      expect(address % 64).toBe(0);
      expect(view.byteOffset).toBe(address);
      if (k > 0)
        expect(address).toBeGreaterThanOrEqual(blocks[k - 1].address + blocks[k - 1].view.byteLength);
    });
  });

  it('identity: a view stays valid when the memory grows', () => {
    const memory = new KernelMemory();
    const { address, view } = memory.float64(2);
    const before = memory.wasm.buffer.byteLength;
    memory.float64(1_000_000);
    expect(memory.wasm.buffer.byteLength).toBeGreaterThan(before);
    view[1] = 7.25;
    expect(new Float64Array(memory.wasm.buffer, address, 2)[1]).toBe(7.25);
  });

  it('identity: knows where its blocks and their parts stand, also from before it grew, and no other numbers', () => {
    const memory = new KernelMemory();
    const { address, view } = memory.float64(8);
    memory.float64(1_000_000);
    expect(memory.addressOf(view)).toBe(address);
    expect(memory.addressOf(view.subarray(2, 5))).toBe(address + 16);
    expect(memory.addressOf(view.slice())).toBeUndefined();
    expect(memory.addressOf(new KernelMemory().float64(8).view)).toBeUndefined();
  });

  it('identity: a scope gives its blocks back, also when it throws', () => {
    const memory = new KernelMemory();
    const first = memory.scope(() => memory.float64(10).address);
    expect(() =>
      memory.scope(() => {
        memory.float64(20);
        throw new RangeError('on purpose');
      }),
    ).toThrow('on purpose');
    expect(memory.float64(10).address).toBe(first);
  });

  it('identity: a block beyond 4 GiB is refused by name, and a smaller one is still to be had', () => {
    const memory = new KernelMemory();
    expect(() => memory.float64(2 ** 29)).toThrow(KernelMemoryFull);
    expect(memory.float64IfThereIsRoom(2 ** 29)).toBeUndefined();
    expect(memory.float64IfThereIsRoom(4)?.view).toHaveLength(4);
  });

  it('identity: two parties of one memory see the same numbers', () => {
    const memory = new KernelMemory();
    const { address, view } = memory.float64(4);
    const partner = new KernelMemory(memory.wasm);
    new Float64Array(partner.wasm.buffer, address, 4)[2] = -3;
    expect(view[2]).toBe(-3);
  });

  it('identity: the memory for one call is always the same', () => {
    expect(scratchMemory()).toBe(scratchMemory());
  });
});
