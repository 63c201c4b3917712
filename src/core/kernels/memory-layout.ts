/** Where things lie in a kernel's memory. The control block comes first, at places every kernel shares; tables and
 *  words follow, each aligned to 16 bytes. */

/** Bytes of a vector of 128 bits: 128 frames of one bit, 16 of a byte, 2 of a double. */
export const vectorBytes = 16;

/** Places in the control block. Lane masks are 128 bits, lane 0 lowest; kernels of fewer lanes use the low bits. */
export const control = {
  /** Lanes that hold a frame under way. */
  active: 0,
  /** Lanes whose word fails some check; written by the syndrome pass. */
  failing: 16,
  /** Lanes whose word is not the one sent; written by the syndrome pass. */
  wrong: 32,
  /** Lanes whose latest iteration changed nothing and is not counted. */
  stuck: 48,
  /** Lanes filled since the latest iteration. */
  fresh: 64,
  /** The generator's four words. */
  random: 80,
  /** Frames still to be drawn. */
  left: 96,
  /** Slot of the ring of cohorts for frames that begin now. */
  slot: 100,
  /** Weight of every pattern, or −1 to draw it from the table. */
  weight: 104,
  /** Entries of the weight table. */
  tableLength: 108,
  /** Counters of 64 bits. */
  frameErrors: 112,
  bitErrors: 120,
  bitErrorsSquared: 128,
  undetected: 136,
  /** What the channel tells a soft kernel: a double, tanh(L/2) of a received 0. */
  parameter: 144,
  /** Bytes of the block. */
  size: 160,
} as const;

/** Hands out places from low to high. */
export class MemoryLayout {
  #end: number = control.size;

  /** The place of a new area of that many bytes, zero at the start. */
  reserve(bytes: number): number {
    const at = this.#end;
    this.#end = (at + bytes + vectorBytes - 1) & -vectorBytes;
    return at;
  }

  get bytes(): number {
    return this.#end;
  }

  /** Pages of 64 KiB that hold everything. */
  get pages(): number {
    return Math.ceil(this.#end / 65536);
  }
}
