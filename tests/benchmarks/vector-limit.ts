/*
 * What 128-bit vectors give at most on this machine: multiplications and additions that wait for nothing. The module
 * is written down byte by byte, so that nothing but the host's compiler stands between it and the processor.
 */
import { callsPerSecond } from './measure';

/** Chains x ← x·factor + term: enough to fill the time that one step takes, few enough for the registers. */
const CHAINS = 12;
const STEPS = 20_000;
const NUMBERS_IN_VECTOR = 2;

const I32 = 0x7f;
const F64 = 0x7c;
const V128 = 0x7b;
const END = 0x0b;
const getLocal = (index: number) => [0x20, index];
const setLocal = (index: number) => [0x21, index];
const constant = (value: number) => [0x44, ...new Uint8Array(new Float64Array([value]).buffer)];
const vector = (...operation: number[]) => [0xfd, ...operation];
const splat = vector(0x14);
const add = vector(0xf0, 0x01);
const multiply = vector(0xf2, 0x01);
const firstNumber = vector(0x21, 0);

/** A count below 2¹⁴ in the variable-length form. */
const count = (value: number) => (value < 128 ? [value] : [(value & 127) | 128, value >> 7]);
const section = (id: number, content: number[]) => [id, ...count(content.length), ...content];

function moduleCode(): Uint8Array<ArrayBuffer> {
  const [counter, factor, term, chain] = [0, 1, 2, 3];
  const chains = Array.from({ length: CHAINS }, (_, k) => chain + k);
  const body = [
    ...[1, CHAINS + 2, V128],
    ...[...constant(0.999), ...splat, ...setLocal(factor), ...constant(0.001), ...splat, ...setLocal(term)],
    ...[0x03, 0x40],
    ...chains.flatMap((k) => [
      ...getLocal(k),
      ...getLocal(factor),
      ...multiply,
      ...getLocal(term),
      ...add,
      ...setLocal(k),
    ]),
    // counter − 1, again while it is not zero
    ...[...getLocal(counter), 0x41, 1, 0x6b, 0x22, counter, 0x0d, 0, END],
    ...[...getLocal(chain), ...chains.slice(1).flatMap((k) => [...getLocal(k), ...add]), ...firstNumber, END],
  ];
  return Uint8Array.from([
    ...[0, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
    ...section(1, [1, 0x60, 1, I32, 1, F64]),
    ...section(3, [1, 0]),
    ...section(7, [1, 3, ...Buffer.from('run'), 0, 0]),
    ...section(10, [1, ...count(body.length), ...body]),
  ]);
}

/** Operations a second of one thread. */
export function vectorLimit(): number {
  const instance = new WebAssembly.Instance(new WebAssembly.Module(moduleCode()));
  const run = instance.exports.run as (steps: number) => number;
  return callsPerSecond(() => run(STEPS), 0.3) * STEPS * CHAINS * 2 * NUMBERS_IN_VECTOR;
}
