/** The upper half of the one not-a-number that is stored; which of the many a machine makes is its own affair. */
const notANumber = 0x7ff80000;

/** Numbers as they are stored: float64, little-endian, whatever the machine. */
export function littleEndianBytes(values: Float64Array): Uint8Array {
  const bytes = new Uint8Array(8 * values.length);
  const view = new DataView(bytes.buffer);
  values.forEach((x, i) => (Number.isNaN(x) ? view.setUint32(8 * i + 4, notANumber, true) : view.setFloat64(8 * i, x, true)));
  return bytes;
}

/** Stored numbers read back; bytes beyond the last whole number are left out. */
export function readLittleEndian(bytes: Uint8Array): Float64Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  return Float64Array.from({ length: Math.floor(bytes.byteLength / 8) }, (_, i) => view.getFloat64(8 * i, true));
}
