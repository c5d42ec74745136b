/** A column of numbers that grows as rows arrive; a million rows take 8 MB. */
export interface GrowingColumn {
  push(value: number): void;
  /** The numbers so far, without spare room. */
  finish(): Float64Array;
}

/** Makes an empty growing column. */
export function createColumn(): GrowingColumn {
  const blockLength = 65_536;
  const blocks: Float64Array[] = [];
  let block = new Float64Array(blockLength);
  let used = 0;
  return {
    push(value) {
      if (used === blockLength) {
        blocks.push(block);
        block = new Float64Array(blockLength);
        used = 0;
      }
      block[used] = value;
      used += 1;
    },
    finish() {
      const whole = new Float64Array(blocks.length * blockLength + used);
      blocks.forEach((part, index) => whole.set(part, index * blockLength));
      whole.set(block.subarray(0, used), blocks.length * blockLength);
      return whole;
    },
  };
}
