// Where the large parts of the page are: in data blocks of this page, or in classic scripts beside it that call PULSEWRIGHT.deliver.
// Knows how a part is written (gzip, then base64) and nothing of what it is for.

const waiting = new Map();

window.PULSEWRIGHT = Object.assign(window.PULSEWRIGHT ?? {}, {
  deliver: (name, text) => waiting.get(name)?.(text),
});

export async function partOfPage(name) {
  return inflated(name, await packedPart(name));
}

export async function packedPart(name) {
  if (!arrived(block(name))) await parsed();
  const text = block(name)?.textContent ?? (await delivered(name));
  return bytesOf(name, text);
}

export async function hasPart(name) {
  await parsed();
  return block(name) !== null || name in places();
}

function block(name) {
  return document.getElementById(`part-${name}`);
}

// While the page is being read, a block is whole once something stands behind it.
function arrived(element) {
  return document.readyState !== 'loading' || Boolean(element?.nextSibling);
}

function parsed() {
  if (document.readyState !== 'loading') return null;
  return new Promise((resolve) => { document.addEventListener('DOMContentLoaded', resolve, { once: true }); });
}

function places() {
  return JSON.parse(document.getElementById('parts')?.textContent ?? '{}');
}

function delivered(name) {
  return new Promise((resolve, reject) => {
    const script = document.createElement('script');
    waiting.set(name, resolve);
    script.onerror = () => reject(new Error(`the file ${script.getAttribute('src')} could not be loaded; it belongs beside this page`));
    script.onload = () => reject(new Error(`the file ${script.getAttribute('src')} arrived incomplete`)); // too late when it has delivered
    script.src = places()[name];
    document.head.append(script);
  });
}

function bytesOf(name, text) {
  try {
    return Uint8Array.fromBase64 ? Uint8Array.fromBase64(text) : loopedBytes(atob(text));
  } catch {
    throw new Error(`the part "${name}" of this page is damaged`);
  }
}

function loopedBytes(binary) {
  const bytes = new Uint8Array(binary.length);
  for (let i = 0; i < binary.length; i += 1) bytes[i] = binary.charCodeAt(i);
  return bytes;
}

export async function inflated(name, bytes) {
  if (typeof DecompressionStream === 'undefined') throw new Error('this browser cannot unpack gzip (it needs one of 2023 or later)');
  try {
    const stream = new Blob([bytes]).stream().pipeThrough(new DecompressionStream('gzip'));
    return new Uint8Array(await new Response(stream).arrayBuffer());
  } catch {
    throw new Error(`the part "${name}" of this page is damaged or incomplete`);
  }
}
