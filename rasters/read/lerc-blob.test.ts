import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { readLercBlob } from './lerc-blob.ts';

/** The blob in a fixture of one strip, which stands at the file's end. */
const blobOf = (name: string) => {
  const bytes = readFileSync(new URL(`../fixtures/${name}`, import.meta.url));
  return new Uint8Array(bytes.subarray(bytes.indexOf('Lerc2 ')));
};
const shape = { width: 9, samples: 1, rows: 7, dataType: 'float32' } as const;
const missing = (mask: Uint8Array) =>
  Array.from({ length: 63 }, (_, i) => i).filter((i) => (mask[i >> 3] & (0x80 >> (i & 7))) === 0);

/** The blob with a 32-bit number of its header changed. */
const altered = (at: number, value: number) => {
  const blob = blobOf('good-lerc-nan.tif');
  new DataView(blob.buffer).setInt32(at, value, true);
  return blob;
};

it('finds the cells that GDAL left out as NaN', () => {
  const { mask } = readLercBlob(blobOf('good-lerc-nan.tif'), shape);
  expect(mask && missing(mask)).toEqual([33, 34]);
  const none = readLercBlob(altered(26, 0), shape);
  expect(none.mask && missing(none.mask)).toHaveLength(63);
  expect(readLercBlob(altered(26, 63), shape).mask).toBeUndefined();
});

it('refuses a header that says anything but the strip or tile', () => {
  const refused = (blob: Uint8Array, words: string) => expect(() => readLercBlob(blob, shape)).toThrow(words);
  refused(altered(0, 0), 'without its header');
  refused(altered(6, 5), 'version 2.5');
  refused(altered(14, 8), '9 × 8 cells where 9 × 7 belong');
  refused(altered(18, 100_000), '100000 × 7');
  refused(altered(22, 2), 'other numbers');
  refused(altered(38, 7), 'other numbers');
  refused(altered(30, 0), 'steps of 0');
  refused(altered(30, 100_000), 'steps of 100000');
  refused(altered(34, 0), 'says 0');
  refused(altered(66, 1), 'mask ends too early');
  refused(altered(70, 0x7fff), 'mask is of another size');
  refused(blobOf('good-lerc-nan.tif').subarray(0, 60), 'without its header');
});
