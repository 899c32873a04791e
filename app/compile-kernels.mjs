/*
 * Compiles the fast kernels, engine/kernels/assembly/*.ts (AssemblyScript), into engine/kernels/compiled/*.ts: the
 * WebAssembly code as a string, so that bundles, workers and tests need no file beside them. Folders below assembly/
 * hold what several kernels share. Done again only when a source is newer.
 */
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { basename, join, relative } from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const sources = join(root, 'engine/kernels/assembly');
const compiled = join(root, 'engine/kernels/compiled');

/** Several threads run one kernel on one memory: no allocation, no static data, no memory of its own. */
const OPTIONS = [
  '-O3',
  '--converge',
  '--noAssert',
  '--runtime=stub',
  '--use=abort=',
  '--enable=simd,threads',
  '--importMemory',
  '--sharedMemory',
  '--initialMemory=1',
  '--maximumMemory=65536',
];

export async function compileKernels() {
  mkdirSync(compiled, { recursive: true });
  const entries = readdirSync(sources).filter((name) => name.endsWith('.ts'));
  const changed = newest(sources);
  const current = (name) => {
    const file = join(compiled, name);
    return existsSync(file) && statSync(file).mtimeMs > changed;
  };
  for (const name of readdirSync(compiled)) if (!entries.includes(name)) rmSync(join(compiled, name));
  const stale = entries.filter((name) => !current(name));
  if (stale.length === 0) return;
  const { default: compiler } = await import('assemblyscript/asc');
  for (const name of stale) writeModule(name, await compile(compiler, join(sources, name)));
}

async function compile(compiler, source) {
  let binary;
  const writeFile = (file, contents) => {
    if (file.endsWith('.wasm')) binary = contents;
  };
  const { error, stderr } = await compiler.main(
    [relative(root, source), '--baseDir', root, '--outFile', 'kernel.wasm', ...OPTIONS],
    { writeFile },
  );
  if (error) throw new Error(`${relative(root, source)}: ${stderr.toString() || error.message}`);
  return binary;
}

/** Whole or not at all: another process may be reading. */
function writeModule(name, binary) {
  const file = join(compiled, name);
  const temporary = `${file}.${process.pid}.tmp`;
  const code = Buffer.from(binary).toString('base64');
  writeFileSync(
    temporary,
    `// compiled from ../assembly/${name} by app/compile-kernels.mjs\nexport const ${exportName(name)} = '${code}';\n`,
  );
  renameSync(temporary, file);
}

/** matrix-product.ts → matrixProductCode */
function exportName(name) {
  return `${basename(name, '.ts').replace(/-(\w)/g, (_, letter) => letter.toUpperCase())}Code`;
}

function newest(folder) {
  const times = readdirSync(folder, { recursive: true, encoding: 'utf8' }).map(
    (name) => statSync(join(folder, name)).mtimeMs,
  );
  return Math.max(...times, statSync(folder).mtimeMs, statSync(fileURLToPath(import.meta.url)).mtimeMs);
}
