/** Against the format's own text (NumPy Enhancement Proposal 1, "A Simple File Format for NumPy Arrays", from memory) and NumPy itself. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { encodeNpy } from '../../src/run-folder/encode-npy.js';

/** numpy.save (NumPy 2.4.6, little-endian) of array([[0.5, -1.25, 3.0], [nan, 1e-300, -0.0]]). */
const FROM_NUMPY = [
  'k05VTVBZAQB2AHsnZGVzY3InOiAnPGY4JywgJ2ZvcnRyYW5fb3JkZXInOiBGYWxzZSwgJ3NoYXBlJzogKDIsIDMpLCB9ICAgICAgICAgICAg',
  'ICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgIAoAAAAAAADgPwAAAAAAAPS/AAAAAAAACEAAAAAAAAD4f1nz',
  '+MIfbqUBAAAAAAAAAIA=',
].join('');

describe('encodeNpy', () => {
  it('writes the bytes that NumPy writes', () => {
    const bytes = encodeNpy(Float64Array.of(0.5, -1.25, 3, Number.NaN, 1e-300, -0), [2, 3]);
    expect(Buffer.from(bytes).toString('base64')).toBe(FROM_NUMPY);
  });

  it('keeps to the format for any shape of up to 4 axes', () => {
    const shapes = fc.array(fc.integer({ min: 1, max: 12 }), { minLength: 1, maxLength: 4 });
    fc.assert(
      fc.property(shapes, fc.double({ noNaN: true }), (shape, first) => {
        const values = new Float64Array(shape.reduce((a, b) => a * b, 1)).map((_, i) => first + i);
        const bytes = Buffer.from(encodeNpy(values, shape));
        expect(bytes.subarray(0, 8).toString('latin1')).toBe('\x93NUMPY\x01\x00');
        const start = 10 + bytes.readUInt16LE(8);
        expect(start % 64).toBe(0);
        const header = bytes.subarray(10, start).toString('latin1');
        expect(header).toMatch(/^\{'descr': '<f8', 'fortran_order': False, 'shape': \((\d+,|\d+(, \d+)+)\), \} *\n$/);
        expect(/\(([\d, ]+)\)/.exec(header)?.[1].split(',').filter(Boolean).map(Number)).toEqual(shape);
        const data = bytes.subarray(start);
        expect(data.length).toBe(8 * values.length);
        expect(Array.from(values, (_, i) => data.readDoubleLE(8 * i))).toEqual([...values]);
      }),
    );
  });

  it('refuses a shape that does not fit', () => {
    expect(() => encodeNpy(new Float64Array(5), [2, 3])).toThrow(RangeError);
  });
});
