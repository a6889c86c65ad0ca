/** A Float64Array that grows as numbers are added. */
export interface Growing {
  push(value: number): void;
  readonly length: number;
  /** The numbers so far; a copy of the right length. */
  finish(): Float64Array;
}

const FIRST = 4096;

export function growing(): Growing {
  let values = new Float64Array(FIRST);
  let length = 0;
  return {
    push(value) {
      if (length === values.length) {
        const larger = new Float64Array(length * 2);
        larger.set(values);
        values = larger;
      }
      values[length++] = value;
    },
    get length() {
      return length;
    },
    finish: () => values.slice(0, length),
  };
}
