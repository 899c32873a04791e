#!/usr/bin/env node
/*
 * Builds the programs in out/ from the sources. Runs by itself after `npm ci`; again with `npm run build`.
 *
 *   node app/build.mjs                 everything
 *   node app/build.mjs --if-changed    only when a source is newer than the last build
 *
 * Safe beside a running program and beside another build: files are replaced whole, chunks carry their content
 * in their name, entries come last, and chunks that nothing names any more stay for an hour.
 */
import {
  chmodSync,
  existsSync,
  mkdirSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { dirname, join, relative } from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import { compileKernels } from './compile-kernels.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const out = join(root, 'out');
const stamp = join(out, 'build-stamp');

/** Programs that run in Node or in Electron's main process; they share chunks. */
const NODE_ENTRIES = {
  farwell: 'app/cli/farwell.ts',
  start: 'app/browser-host/start.ts',
  'electron-main': 'app/main/main.ts',
  benchmark: 'tests/benchmarks/main.ts',
};
/** A file of its own each, so that a thread starts by reading one file. */
const WORKER_ENTRIES = { worker: 'app/calculation/worker.ts', helper: 'app/calculation/helper.ts' };
/** One CommonJS file: a sandboxed preload script has no module loader. */
const PRELOAD_ENTRIES = { preload: 'app/preload/preload.ts' };
const RENDERER_PAGE = 'app/renderer/index.html';

const EXECUTABLES = new Set(['farwell.js', 'start.js']);
const SHEBANG = '#!/usr/bin/env node\n';
/** Electron is given by its own runtime; resvg and pdfmake read files beside themselves, as fontkit under pdfmake does; canvas is an optional extra that vega asks for and that we do not use. */
const EXTERNAL = ['electron', '@resvg/resvg-wasm', 'pdfmake', 'fontkit', 'canvas'];
const STALE_AFTER_MS = 3_600_000;
/** What decides whether a build is still good. */
const SOURCES = ['app', 'engine', 'tests/benchmarks', 'package.json', 'package-lock.json'];

// before anything is measured against their age: what they leave counts as a source
await compileKernels().catch(giveUp);
const started = Date.now();
if (process.argv.includes('--if-changed') && existsSync(stamp) && newestSource() < statSync(stamp).mtimeMs)
  process.exit(0);

// whoever calls (a test runner, say) may be in another mode, and packages would be bundled in theirs
process.env.NODE_ENV = 'production';
const { build } = await import('vite');
const shared = { configFile: false, root, logLevel: 'warn' };

const outputs = await Promise.all([
  buildForNode(NODE_ENTRIES, { format: 'es' }),
  ...Object.entries(WORKER_ENTRIES).map(([name, source]) =>
    buildForNode({ [name]: source }, { format: 'es', codeSplitting: false }),
  ),
  buildForNode(PRELOAD_ENTRIES, { format: 'cjs', entryFileNames: '[name].cjs', codeSplitting: false }),
  buildRenderer(),
]).catch(giveUp);
const written = writeAll(outputs.flat());
removeStale(written);
writeFileSync(stamp, '');
// sources that changed during the build are newer than its start, and must count as changed
utimesSync(stamp, started / 1000, started / 1000);
console.log(`Built ${written.size} files in out/ in ${((Date.now() - started) / 1000).toFixed(1)} s.`);

function giveUp(error) {
  console.error(error.message);
  process.exit(1);
}

/** @returns {Promise<{ fileName: string, content: string | Uint8Array }[]>} */
async function buildForNode(entries, output) {
  const result = await build({
    ...shared,
    build: {
      ssr: true,
      write: false,
      target: 'node20',
      minify: false,
      rollupOptions: {
        input: Object.fromEntries(
          Object.entries(entries).map(([name, source]) => [name, join(root, source)]),
        ),
        external: EXTERNAL,
        output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name]-[hash].js', ...output },
      },
    },
    ssr: { target: 'node', noExternal: true, external: EXTERNAL },
    // bundled CommonJS packages may ask for their own place, which an ES module knows under another name
    define:
      output.format === 'es' ? { __filename: 'import.meta.filename', __dirname: 'import.meta.dirname' } : {},
  });
  return filesOf(result);
}

async function buildRenderer() {
  const { default: react } = await import('@vitejs/plugin-react');
  const result = await build({
    ...shared,
    root: join(root, dirname(RENDERER_PAGE)),
    // relative, as the page is served under a token's path by one host and under a scheme of its own by the other
    base: './',
    plugins: [react()],
    // plotly alone is above the size at which vite warns
    build: {
      write: false,
      target: 'es2022',
      chunkSizeWarningLimit: 8000,
      modulePreload: { polyfill: false },
    },
  });
  return filesOf(result).map((file) => ({ ...file, fileName: `renderer/${file.fileName}` }));
}

function filesOf(result) {
  return [result].flat().flatMap(({ output }) =>
    output.map((file) => ({
      fileName: file.fileName,
      content: file.type === 'chunk' ? file.code : file.source,
      isEntry: file.type === 'chunk' ? file.isEntry : file.fileName.endsWith('.html'),
    })),
  );
}

function writeAll(files) {
  const ordered = [...files].sort((a, b) => Number(a.isEntry) - Number(b.isEntry));
  const written = new Set();
  for (const { fileName, content } of ordered) {
    const path = join(out, fileName);
    const executable = EXECUTABLES.has(fileName);
    const text = executable && !content.startsWith('#!') ? SHEBANG + content : content;
    mkdirSync(dirname(path), { recursive: true });
    const temporary = `${path}.${process.pid}.tmp`;
    writeFileSync(temporary, text);
    if (executable) chmodSync(temporary, 0o755);
    renameSync(temporary, path);
    written.add(path);
  }
  return written;
}

/** Everything in out/ that a build writes and this one did not; out/types belongs to the type checker. */
function removeStale(written) {
  for (const path of filesBelow(out)) {
    if (written.has(path) || path === stamp || relative(out, path).startsWith('types')) continue;
    if (Date.now() - statSync(path).mtimeMs > STALE_AFTER_MS) rmSync(path);
  }
}

function filesBelow(folder) {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name));
}

/** Folders count too: a deleted file leaves its trace in the time of its folder. */
function newestSource() {
  const times = SOURCES.filter((source) => existsSync(join(root, source))).flatMap((source) => {
    const path = join(root, source);
    const own = statSync(path);
    if (!own.isDirectory()) return [own.mtimeMs];
    const below = readdirSync(path, { recursive: true, encoding: 'utf8' });
    return [
      own.mtimeMs,
      ...below.map((name) => statSync(join(path, name), { throwIfNoEntry: false })?.mtimeMs ?? started),
    ];
  });
  return Math.max(...times);
}
