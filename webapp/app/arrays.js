// Turns an answer of the engine into values: JSON in which {"$": [dtype, shape, offset]} stands for an array in the buffer.
// The arrays are views of that buffer; one of two dimensions is flat, row after row, and carries its `shape`.

const TYPES = {
  float64: Float64Array, float32: Float32Array, int32: Int32Array, int16: Int16Array, int8: Int8Array,
  uint32: Uint32Array, uint16: Uint16Array, uint8: Uint8Array,
};

export function revived(text, buffer) {
  return JSON.parse(text, (key, value) => (Array.isArray(value?.$) ? viewOf(value.$, buffer) : value));
}

function viewOf([dtype, shape, offset], buffer) {
  const view = new TYPES[dtype](buffer, offset, shape.reduce((count, size) => count * size, 1));
  return shape.length === 1 ? view : Object.assign(view, { shape });
}
