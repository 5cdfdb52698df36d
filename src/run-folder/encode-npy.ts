/** NumPy's array file, format version 1.0 ("A Simple File Format for NumPy Arrays", NEP 1; numpy.lib.format). */
const MAGIC = [0x93, ...Buffer.from('NUMPY', 'latin1'), 1, 0];
const LENGTH_BYTES = 2;
/** Data begins at a multiple of this many bytes. */
const ALIGNMENT = 64;

/**
 * Bytes of a .npy file of little-endian doubles in C order.
 * @param shape cells along the first axis first, as NumPy counts them (its last index runs fastest through `values`)
 */
export function encodeNpy(values: Float64Array, shape: readonly number[]): Uint8Array {
  const cells = shape.reduce((product, n) => product * n, 1);
  if (cells !== values.length)
    throw new RangeError(`shape ${shape.join(' × ')} wants ${cells} values, not ${values.length}`);
  const tuple = shape.length === 1 ? `${shape[0]},` : shape.join(', ');
  const text = `{'descr': '<f8', 'fortran_order': False, 'shape': (${tuple}), }`;
  const before = MAGIC.length + LENGTH_BYTES;
  const start = Math.ceil((before + text.length + 1) / ALIGNMENT) * ALIGNMENT;
  const bytes = new Uint8Array(start + 8 * values.length);
  const view = new DataView(bytes.buffer);
  bytes.set(MAGIC);
  view.setUint16(MAGIC.length, start - before, true);
  bytes.set(Buffer.from(`${text.padEnd(start - before - 1)}\n`, 'latin1'), before);
  for (let i = 0; i < values.length; i++) view.setFloat64(start + 8 * i, values[i], true);
  return bytes;
}
