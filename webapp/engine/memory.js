// Puts the memory of a started Python together again. It is sent as what differs from the memory that WebAssembly starts with,
// page by page, because half of what is in it is already in pyodide.asm.wasm. Knows the binary format of WebAssembly, nothing of Python.
// Sent: four counts (head, memory, page size, pages), the head, the index of the pages, the pages, each XOR what was there.

const DATA_SECTION = 11;
const I32_CONST = 0x41;
const COUNTS = 4;

export function rememberedMemory(sent, wasm) {
  const [headSize, size, pageSize, pages] = new Uint32Array(sent.slice(0, 4 * COUNTS).buffer);
  const index = new Uint32Array(sent.slice(4 * COUNTS + headSize, 4 * COUNTS + headSize + 4 * pages).buffer);
  const whole = new Uint8Array(headSize + size);
  whole.set(sent.subarray(4 * COUNTS, 4 * COUNTS + headSize));
  const memory = whole.subarray(headSize);
  placeData(memory, wasm);
  let start = 4 * COUNTS + headSize + 4 * pages;
  for (const page of index) {
    change(memory.subarray(page * pageSize, (page + 1) * pageSize), sent.subarray(start, start + pageSize));
    start += pageSize;
  }
  return whole;
}

function change(page, difference) {
  const [words, changes] = [wordsOf(page), wordsOf(difference)];
  for (let i = 0; i < words.length; i += 1) words[i] ^= changes[i];
}

function wordsOf(bytes) {
  return new Uint32Array(bytes.buffer, bytes.byteOffset, bytes.length / 4); // all sizes before it are multiples of four
}

// Copies the data segments of a WebAssembly binary to where they belong in memory.
function placeData(memory, wasm) {
  let at = 8;

  function count() {
    let [value, shift, byte] = [0, 0, 0];
    do {
      byte = wasm[at];
      at += 1;
      value += (byte & 127) * 2 ** shift;
      shift += 7;
    } while (byte > 127);
    return value;
  }

  function placeSegments() {
    for (let left = count(); left > 0; left -= 1) {
      if (count() !== 0 || wasm[at] !== I32_CONST) throw new Error('the engine has a data segment of a kind that is not known here');
      at += 1;
      const place = count(); // no sign: all lie in the lower half of memory
      at += 1;
      const length = count();
      memory.set(wasm.subarray(at, at + length), place);
      at += length;
    }
  }

  while (at < wasm.length) {
    const section = wasm[at];
    at += 1;
    const length = count();
    if (section === DATA_SECTION) placeSegments();
    else at += length;
  }
}
