#!/usr/bin/env node
/* Draws icon.png, from which the packages make their icons, from icon.svg: `node app/resources/draw-icon.mjs`. */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { initWasm, Resvg } from '@resvg/resvg-wasm';

const beside = (name) => new URL(name, import.meta.url);
const drawer = fileURLToPath(import.meta.resolve('@resvg/resvg-wasm/index_bg.wasm'));

await initWasm(readFileSync(drawer));
const drawing = new Resvg(readFileSync(beside('icon.svg'), 'utf8'), { fitTo: { mode: 'width', value: 512 } });
writeFileSync(beside('icon.png'), drawing.render().asPng());
