/** Typed arrays over shared memory: threads receive the scene without a copy. */
export function sharedDoubles(source: ArrayLike<number>): Float64Array {
  const array = new Float64Array(new SharedArrayBuffer(8 * source.length));
  array.set(source);
  return array;
}

/** Several arrays one after another. */
export function sharedFloats(sources: readonly Float32Array[], length: number): Float32Array {
  const array = new Float32Array(new SharedArrayBuffer(4 * length));
  let at = 0;
  for (const source of sources) {
    array.set(source, at);
    at += source.length;
  }
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
