// The only file that knows Pyodide: starts it from bytes that the page sends, then answers requests through bridge.py.
// Knows nothing of plans or figures. The build puts Pyodide's two modules before it as createPyodideModule and loadPyodide.
// In: {part, bytes}, then {id, action, args}. Out: {stage}, {ready} or {failed}, then {id, text, buffer} or {id, error}.

import { rememberedMemory } from './memory.js';

const NOWHERE = 'https://pulsewright.invalid/'; // Pyodide wants an address; this one leads nowhere, and nothing is asked of it
const FILES = { 'pyodide.asm.wasm': ['wasm', 'application/wasm'], 'python_stdlib.zip': ['stdlib', 'application/zip'] };
const NO_PACKAGES = { info: { arch: 'wasm32', platform: 'emscripten', abi_version: '2026_0' }, packages: {} };

const parts = new Map();
let answer = null;

function part(name) {
  if (!parts.has(name)) {
    const entry = {};
    entry.bytes = new Promise((resolve) => { entry.arrive = resolve; });
    parts.set(name, entry);
  }
  return parts.get(name);
}

function fail(error) {
  postMessage({ failed: { name: error?.name ?? 'Error', message: String(error?.message ?? error) } });
}

globalThis.fetch = async (address) => {
  const file = FILES[String(address).slice(NOWHERE.length)];
  if (!file) throw new TypeError(`the engine asked for ${address}, which is not part of it`);
  return new Response(await part(file[0]).bytes, { headers: { 'Content-Type': file[1] } });
};

// When WebAssembly refuses its bytes, Pyodide warns and waits for ever: say it instead.
const instantiate = WebAssembly.instantiateStreaming;
WebAssembly.instantiateStreaming = (...given) => instantiate(...given).catch((error) => {
  fail(error);
  throw error;
});

// A pack is a length, a JSON list of [path, length], and the files one after the other.
function placePack(FS, folder, pack) {
  const head = 4 + new DataView(pack.buffer, pack.byteOffset).getUint32(0, true);
  let start = head;
  for (const [path, length] of JSON.parse(new TextDecoder().decode(pack.subarray(4, head)))) {
    const file = `${folder}/${path}`;
    FS.mkdirTree(file.slice(0, file.lastIndexOf('/')));
    FS.writeFile(file, pack.subarray(start, start + length), { canOwn: true });
    start += length;
  }
}

async function placePacks(FS, { sitePackages }) {
  for (const name of ['numpy', 'core']) placePack(FS, sitePackages, await part(name).bytes);
}

async function remembered() {
  return rememberedMemory(await part('snapshot').bytes, await part('wasm').bytes);
}

async function start({ snapshot }) {
  postMessage({ stage: 'Python' });
  const python = await loadPyodide({
    createPyodideModule,
    indexURL: NOWHERE,
    packageBaseUrl: NOWHERE,
    lockFileContents: NO_PACKAGES,
    jsglobals: {}, // nothing of the browser is in Python's reach
    fsInit: placePacks,
    ...(snapshot ? { _loadSnapshot: remembered() } : {}),
  });
  postMessage({ stage: 'numpy' });
  python.pyimport('numpy').destroy();
  postMessage({ stage: 'core' });
  answer = python.pyimport('webapp.engine.bridge').answer;
  postMessage({ ready: true });
}

function reply({ id, action, args }) {
  const pair = answer(JSON.stringify({ action, args }));
  const [text, arrays] = [pair.get(0), pair.get(1)];
  const view = arrays.getBuffer('u8');
  const buffer = view.data.slice().buffer; // a copy: the view lies in Python's own memory, which cannot be handed over
  for (const used of [view, arrays, pair]) (used.release ?? used.destroy).call(used);
  postMessage({ id, text, buffer }, [buffer]);
}

onmessage = ({ data }) => {
  if (data.start) start(data.start).catch(fail);
  else if (data.part) part(data.part).arrive(data.bytes);
  else {
    try {
      reply(data);
    } catch (error) {
      postMessage({ id: data.id, error: { message: 'The engine stopped in this step.', traceback: String(error?.message ?? error) } });
    }
  }
};
