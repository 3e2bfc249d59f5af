/** A series of numbers whose length is not known beforehand: a typed array that doubles when it is full. */
export class GrowingSeries {
  #values: Float64Array;
  #length = 0;

  constructor(capacity = 1024) {
    this.#values = new Float64Array(capacity);
  }

  get length(): number {
    return this.#length;
  }

  push(value: number): void {
    if (this.#length === this.#values.length) {
      const larger = new Float64Array(this.#values.length * 2);
      larger.set(this.#values);
      this.#values = larger;
    }
    this.#values[this.#length++] = value;
  }

  /** A copy of what has been pushed so far. */
  toArray(): Float64Array {
    return this.#values.slice(0, this.#length);
  }
}
