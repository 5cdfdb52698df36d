/** Typed arrays over shared memory: threads receive the scene without a copy. */
export function sharedDoubles(source: ArrayLike<number>): Float64Array {
  const array = new Float64Array(new SharedArrayBuffer(8 * source.length));
  array.set(source);
  return array;
}

export function sharedInts(source: ArrayLike<number>): Int32Array {
  const array = new Int32Array(new SharedArrayBuffer(4 * source.length));
  array.set(source);
  return array;
}

export function sharedBytes(source: ArrayLike<number>): Int8Array {
  const array = new Int8Array(new SharedArrayBuffer(source.length));
  array.set(source);
  return array;
}
