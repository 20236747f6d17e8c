/**
 * Random numbers by counting: the number of a stream at a trial is a function of seed, stream and trial alone, so that results
 * are the same for every size and order of blocks, and a further stream changes none of the others.
 * Source: Threefry-2x32, J. K. Salmon et al., Parallel random numbers: as easy as 1, 2, 3, SC11 (2011); with 13 rounds, the
 * shorter of the two variants whose known answers the authors publish, for the numbers of a stream, and 20 for its key.
 */

/** The key of a stream: two words of 32 bits. */
export type StreamKey = readonly [number, number];

/** Largest trial count: the counter is a word of 32 bits. */
export const COUNTER_LIMIT = 2 ** 32;

const PARITY = 0x1bd11bda;
const ROTATIONS = [13, 15, 26, 6, 17, 29, 16, 24];

/** The block cipher itself, as published, for any number of rounds. */
export function threefry2x32(counter: StreamKey, key: StreamKey, rounds: number): StreamKey {
  const schedule = [key[0] | 0, key[1] | 0, PARITY ^ key[0] ^ key[1]];
  const word = (index: number): number => schedule[index % 3] as number;
  let x0 = (counter[0] + word(0)) | 0;
  let x1 = (counter[1] + word(1)) | 0;
  for (let round = 0; round < rounds; round++) {
    const by = ROTATIONS[round % 8] as number;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << by) | (x1 >>> (32 - by))) ^ x0;
    if (round % 4 !== 3) continue;
    const injection = (round + 1) / 4;
    x0 = (x0 + word(injection)) | 0;
    x1 = (x1 + word(injection + 1) + injection) | 0;
  }
  return [x0 >>> 0, x1 >>> 0];
}

/** The key of the stream with this name under a seed, a whole number from 0 up to 2^53. */
export function streamKey(seed: number, name: string): StreamKey {
  const low = seed % 2 ** 32;
  return threefry2x32(hashOf(name), [low, (seed - low) / 2 ** 32], 20);
}

/** Two words of a text: FNV-1a from two starting points, over UTF-16 units. */
function hashOf(text: string): StreamKey {
  let a = 0x811c9dc5;
  let b = 0x050c5d1f;
  for (let i = 0; i < text.length; i++) {
    const unit = text.charCodeAt(i);
    a = Math.imul(a ^ unit, 0x01000193);
    b = Math.imul(b ^ unit ^ (i << 16), 0x01000193);
  }
  return [a >>> 0, b >>> 0];
}

/**
 * Fills a column with numbers evenly spread over 0 to 1, both ends left out: those of trials `start` and following. Each is
 * (52 bits of two words + ½)/2^52. The rounds are written out: this is the inner loop of all trials.
 */
export function fillEven(column: Float64Array, [k0, k1]: StreamKey, start: number, count: number): void {
  const k2 = PARITY ^ k0 ^ k1;
  for (let i = 0; i < count; i++) {
    let x0 = (start + i + k0) | 0;
    let x1 = k1 | 0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 13) | (x1 >>> 19)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 15) | (x1 >>> 17)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 26) | (x1 >>> 6)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 6) | (x1 >>> 26)) ^ x0;
    x0 = (x0 + k1) | 0;
    x1 = (x1 + k2 + 1) | 0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 17) | (x1 >>> 15)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 29) | (x1 >>> 3)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 16) | (x1 >>> 16)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 24) | (x1 >>> 8)) ^ x0;
    x0 = (x0 + k2) | 0;
    x1 = (x1 + k0 + 2) | 0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 13) | (x1 >>> 19)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 15) | (x1 >>> 17)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 26) | (x1 >>> 6)) ^ x0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 6) | (x1 >>> 26)) ^ x0;
    x0 = (x0 + k0) | 0;
    x1 = (x1 + k1 + 3) | 0;
    x0 = (x0 + x1) | 0;
    x1 = ((x1 << 17) | (x1 >>> 15)) ^ x0;
    column[i] = ((x0 >>> 6) * 67108864 + (x1 >>> 6) + 0.5) * 2.220446049250313e-16;
  }
}
