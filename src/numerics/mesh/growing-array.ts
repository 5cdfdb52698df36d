/** Typed arrays that grow as they are filled: files do not say beforehand how much they hold. */
export class GrowingDoubles {
  values: Float64Array;
  length = 0;

  constructor(expected: number) {
    this.values = new Float64Array(Math.max(16, expected));
  }

  push(value: number): void {
    if (this.length === this.values.length) {
      const larger = new Float64Array(2 * this.length);
      larger.set(this.values);
      this.values = larger;
    }
    this.values[this.length++] = value;
  }

  finish(): Float64Array {
    return this.values.slice(0, this.length);
  }
}

export class GrowingIntegers {
  values: Int32Array;
  length = 0;

  constructor(expected: number) {
    this.values = new Int32Array(Math.max(16, expected));
  }

  push(value: number): void {
    if (this.length === this.values.length) {
      const larger = new Int32Array(2 * this.length);
      larger.set(this.values);
      this.values = larger;
    }
    this.values[this.length++] = value;
  }

  finish(): Int32Array {
    return this.values.slice(0, this.length);
  }
}
