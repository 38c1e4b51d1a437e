// Runs one Python file in the pinned Pyodide under Node, at build time. Usage: node workshop.mjs JOB.json
// The job: {runtime, stdlib, script, folders: {name: path}, words, snapshot?}. The folders are seen by Python as /name,
// the words (a list of texts) as its global `words`.
// With `snapshot` the memory is written there after the script has run; clock and chance stand still, so that it is always the same.

import fs from 'node:fs';
import crypto from 'node:crypto';
import path from 'node:path';
import { pathToFileURL } from 'node:url';

const job = JSON.parse(fs.readFileSync(process.argv[2], 'utf8'));

function standStill() {
  const noon = Date.UTC(2026, 0, 1, 12);
  Date.now = () => noon;
  performance.now = () => 0;
  const fill = (view) => new Uint8Array(view.buffer, view.byteOffset, view.byteLength).fill(42) && view;
  crypto.randomFillSync = fill;
  globalThis.crypto.getRandomValues = fill;
}

async function booted() {
  const { loadPyodide } = await import(pathToFileURL(path.join(job.runtime, 'pyodide.mjs')).href);
  return loadPyodide({
    indexURL: job.runtime,
    stdLibURL: job.stdlib,
    packageBaseUrl: job.runtime,
    lockFileContents: { info: { arch: 'wasm32', platform: 'emscripten', abi_version: '2026_0' }, packages: {} },
    jsglobals: {},
    env: { PYTHONHASHSEED: '0', PYTHONNODEBUGRANGES: '1', PYTHONDONTWRITEBYTECODE: '1' },
    _makeSnapshot: Boolean(job.snapshot),
  });
}

// Node would print the line that threw, which in Pyodide's files is a megabyte.
process.on('uncaughtException', (error) => {
  process.stderr.write(`${String(error?.message ?? error)}\n`);
  process.exit(1);
});

if (job.snapshot) standStill();
const python = await booted();
for (const [name, folder] of Object.entries(job.folders)) {
  python.FS.mkdirTree(`/${name}`);
  python.mountNodeFS(`/${name}`, folder);
}
python.globals.set('words', python.toPy(job.words));
python.runPython(fs.readFileSync(job.script, 'utf8'), { filename: path.basename(job.script) });
for (const name of Object.keys(job.folders)) python.FS.unmount(`/${name}`);
if (job.snapshot) fs.writeFileSync(job.snapshot, python.makeMemorySnapshot());
