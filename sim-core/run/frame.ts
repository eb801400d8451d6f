import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';

/** Cover in 8 bits, round(255·C); Uint8, row-major, a fresh array. */
export function toFrame(cover: Float32Array): Uint8Array {
  const frame = new Uint8Array(cover.length);
  // 255·C is exact in double precision and at most 255, so this is Math.round, at a quarter of its cost.
  for (let i = 0; i < frame.length; i++) frame[i] = (255 * cover[i] + 0.5) | 0;
  return frame;
}

/** SHA-256 in hexadecimal over all frames' bytes, in order of years. */
export function frameDigest() {
  const hash = sha256.create();
  return {
    add: (frame: Uint8Array): void => {
      hash.update(frame);
    },
    /** may be asked for once, at the end */
    value: (): string => bytesToHex(hash.digest()),
  };
}
