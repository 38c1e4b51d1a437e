// Starts the engine in its worker and asks it. Knows the messages and why a start fails; nothing of Pyodide, plans or figures.
// What it was asked rejects with an Error that carries `field` or `traceback`; once failed, it rejects all, now and later.

import { hasPart, inflated, packedPart } from './payload.js';
import { revived } from './arrays.js';

const PARTS = ['wasm', 'stdlib', 'numpy', 'core'];
const PATIENCE_MS = 60000; // for one stage: a slow machine needs some 15 s for all of them
const SWITCHED_OFF = 'WebAssembly is switched off in this browser, and the engine needs it (some security settings do this)';

export function startEngine({ payload = packedPart, onStage = () => {}, onFail = () => {} } = {}) {
  const engine = { worker: null, failure: null, count: 0, waiting: new Map() };
  const ready = new Promise((resolve, reject) => Object.assign(engine, { isReady: resolve, isBroken: reject }));
  ready.catch(() => {}); // a failure is told by onFail, whether or not somebody waits
  const watch = watchdog((stage) => fail(`nothing was heard for ${PATIENCE_MS / 1000} s at the step "${stage}"`));

  function fail(reason) {
    if (engine.failure) return;
    engine.failure = new Error(reason);
    watch.end();
    engine.worker?.terminate();
    engine.isBroken(engine.failure);
    for (const { reject } of engine.waiting.values()) reject(engine.failure);
    onFail(reason);
  }

  function stage(name) {
    watch.at(name);
    onStage(name);
  }

  function heard({ data }) {
    if (data.failed) fail(causeOf(data.failed));
    else if (data.stage) stage(data.stage);
    else if (data.ready) {
      watch.end();
      performance.mark('engine is ready');
      engine.isReady();
    } else settle(engine, data);
  }

  async function ask(action, args = {}) {
    await ready;
    if (engine.failure) throw engine.failure;
    engine.count += 1;
    engine.worker.postMessage({ id: engine.count, action, args });
    return new Promise((resolve, reject) => engine.waiting.set(engine.count, { resolve, reject }));
  }

  async function boot() {
    if (typeof WebAssembly === 'undefined') throw new Error(SWITCHED_OFF);
    stage('parts of the engine');
    const names = await partNames();
    const worker = payload('worker').then((bytes) => inflated('worker', bytes)).then((script) => openWorker(script, names.includes('snapshot')));
    await Promise.all([worker, ...names.map(async (name) => { // all at once, while the worker starts
      const bytes = await payload(name); // packed: unpacking is left to the worker, this thread paints the note
      (await worker).postMessage({ part: name, bytes }, [bytes.buffer]);
    })]);
  }

  function openWorker(script, snapshot) {
    if (engine.failure) throw engine.failure; // ended before it began
    performance.mark('engine starts');
    engine.worker = startWorker(script);
    engine.worker.onmessage = heard;
    engine.worker.onerror = (event) => {
      event.preventDefault();
      fail(`its worker stopped${event.message ? `: ${event.message}` : ' before it began'}`);
    };
    engine.worker.postMessage({ start: { snapshot } });
    return engine.worker;
  }

  boot().catch((error) => fail(causeOf(error)));
  const end = () => {
    watch.end();
    engine.failure ??= new Error('this engine was ended');
    engine.worker?.terminate();
  };
  return { ask, newest: newestOf(ask), ready, end }; // ready rejects where the start fails
}

// One request runs and only the newest waits: what it replaces is answered with null.
export function newestOf(ask) {
  let [running, next] = [false, null];

  async function run() {
    running = true;
    while (next) {
      const { action, args, resolve, reject } = next;
      next = null;
      await ask(action, args).then(resolve, reject);
    }
    running = false;
  }

  return (action, args) => new Promise((resolve, reject) => {
    next?.resolve(null);
    next = { action, args, resolve, reject };
    if (!running) run();
  });
}

// A module worker from a data: address is the one kind that starts over http, from a file and in a sandboxed frame alike.
function startWorker(script) {
  const text = new TextDecoder().decode(script);
  return new Worker(`data:text/javascript,${encodeURIComponent(text)}`, { type: 'module' });
}

async function partNames() {
  return (await hasPart('snapshot')) ? [...PARTS, 'snapshot'] : PARTS;
}

function settle(engine, { id, text, buffer, error }) {
  const { resolve, reject } = engine.waiting.get(id);
  engine.waiting.delete(id);
  const reply = error ? { error } : revived(text, buffer);
  if (reply.error) reject(Object.assign(new Error(reply.error.message), reply.error));
  else resolve(reply.result);
}

function watchdog(onSilence) {
  let timer = 0;
  return {
    at: (stage) => {
      clearTimeout(timer);
      timer = setTimeout(() => onSilence(stage), PATIENCE_MS);
    },
    end: () => clearTimeout(timer),
  };
}

function causeOf({ name, message }) {
  if (name === 'SecurityError') return 'the browser does not let this page start a worker';
  if (name === 'CompileError' && /policy|eval/i.test(message)) return 'the rules of the place this page is in forbid WebAssembly';
  if (name === 'RangeError' || /memory/i.test(message)) return 'this device has not enough memory left for the engine';
  return message;
}
