// The only file that knows Pyodide: starts it from bytes that the page sends, then answers requests through bridge.py.
// Knows nothing of plans or figures. The build puts Pyodide's two modules before it as createPyodideModule and loadPyodide.
// In: {part, bytes}, then {id, action, args}. Out: {stage}, {ready} or {failed}, then {id, text, buffer} or {id, error}.

import { rememberedMemory } from './memory.js';

const NOWHERE = 'https://pulsewright.invalid/'; // Pyodide wants an address; this one leads nowhere, and nothing is asked of it
const FILES = { 'pyodide.asm.wasm': 'wasm', 'python_stdlib.zip': 'stdlib' };
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

async function unpack(name, bytes) {
  try {
    const stream = new Blob([bytes]).stream().pipeThrough(new DecompressionStream('gzip'));
    part(name).arrive(new Uint8Array(await new Response(stream).arrayBuffer()));
  } catch {
    fail(new Error(`the part "${name}" of this page is damaged or incomplete`));
  }
}

function fail(error) {
  postMessage({ failed: { name: error?.name ?? 'Error', message: String(error?.message ?? error) } });
}

globalThis.fetch = async (address) => {
  const name = FILES[String(address).slice(NOWHERE.length)];
  if (!name) throw new TypeError(`the engine asked for ${address}, which is not part of it`);
  return new Response(name === 'wasm' ? null : await part(name).bytes);
};

// The binary is compiled while all else is still on its way; and where Pyodide would only warn and wait for ever, this says why.
const compiled = part('wasm').bytes.then(WebAssembly.compile);
compiled.catch(fail);
WebAssembly.instantiateStreaming = async (_, imports) => {
  const module = await compiled;
  return { module, instance: await WebAssembly.instantiate(module, imports) };
};

// numpy's libraries too: Python asks for them at once when it needs them, and by then they are there.
const AHEAD = /^numpy\/(_core|linalg)\/.*\.so$/; // what importing numpy loads; the rest is compiled when it is used
const libraries = [];
WebAssembly.Module = new Proxy(WebAssembly.Module, {
  construct: (Module, [bytes]) => libraries.find((library) => same(library.bytes, bytes))?.module ?? new Module(bytes),
});

function compileAhead(bytes) {
  WebAssembly.compile(bytes).then((module) => libraries.push({ bytes, module }), () => {});
}

function same(one, other) {
  return one.length === other.length && one.every((byte, i) => byte === other[i]);
}

// A pack is a length, a JSON list of [path, length], and the files one after the other.
function unpacked(pack) {
  const head = 4 + new DataView(pack.buffer, pack.byteOffset).getUint32(0, true);
  let start = head;
  return JSON.parse(new TextDecoder().decode(pack.subarray(4, head))).map(([path, length]) => {
    start += length;
    return { path, bytes: pack.subarray(start - length, start) };
  });
}

const packs = ['numpy', 'core'].map((name) => part(name).bytes.then(unpacked));
packs[0].then((files) => files.filter(({ path }) => AHEAD.test(path)).forEach(({ bytes }) => compileAhead(bytes)));

async function placePacks(FS, { sitePackages }) {
  for (const { path, bytes } of (await Promise.all(packs)).flat()) {
    const file = `${sitePackages}/${path}`;
    FS.mkdirTree(file.slice(0, file.lastIndexOf('/')));
    FS.writeFile(file, bytes, { canOwn: true });
  }
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
  else if (data.part) unpack(data.part, data.bytes);
  else {
    try {
      reply(data);
    } catch (error) {
      postMessage({ id: data.id, error: { message: 'The engine stopped in this step.', traceback: String(error?.message ?? error) } });
    }
  }
};
