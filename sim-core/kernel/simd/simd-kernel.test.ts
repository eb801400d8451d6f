import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { describeFrontSpeeds } from '#sim-core/testing/front-speeds.ts';
import { describeGrazerProperties } from '#sim-core/testing/grazer-properties.ts';
import { describeKernelProperties } from '#sim-core/testing/kernel-properties.ts';
import { kernelSetup } from '#sim-core/testing/setups.ts';
import { describeStepByHand } from '#sim-core/testing/step-by-hand.ts';
import { createSimdKernel } from './simd-kernel.ts';

describeKernelProperties('the shipping kernel', createSimdKernel);
describeStepByHand('the shipping kernel', createSimdKernel);
describeGrazerProperties('the shipping kernel', createSimdKernel);
describeFrontSpeeds('the shipping kernel', createSimdKernel);

/**
 * Change detectors on every bit of C, finer than the digest of frames: written down from this kernel, not from a source.
 * Chromium 156 and Node 20 came to the same. Who changes one on purpose raises `engineVersion`.
 */
test.each([
  ['mean-field', '4091b6bb2efee48cae1616c0d19af77ae339e254c4785019afe6969762fe2915'],
  ['counts', '9e1dd9bac646c1942bf6fafb82115477e45517519d0b3220cf94a66449004310'],
  ['counts, with grazers', 'c55e9ebb28cf57afb7f4a24280eaa72827119d8f22f3dc39af3b5ee34910f826'],
] as const)('keeps its bits (%s)', (what, bits) => {
  const grazed = what.endsWith('grazers');
  const [width, height] = [150, 97];
  const cells = width * height;
  const layer = (factor: number, shift: number, low: number) =>
    Uint8Array.from({ length: cells }, (_, i) => low + ((i * factor + shift) % (256 - low)));
  const cover = Float32Array.from({ length: cells }, (_, i) => (i % 7 === 0 && i % width < 60 ? 0.3 : 0));
  const kernel = createSimdKernel(
    kernelSetup({
      width,
      height,
      mode: what === 'mean-field' ? what : 'counts',
      vigour: layer(31, 7, 90),
      exposure: layer(57, 3, 0),
      refuge: layer(101, 9, 0),
      cover,
      clumps: Uint32Array.from(cover, (c) => Math.floor(c * 16)),
      rates: { backgroundLoss: 0.03, crowding: 0.4 },
      grazers: grazed ? { rates: { initialGrazers: 30 }, variance: 6, fence: layer(13, 5, 0) } : undefined,
    }),
  );
  for (let i = 0; i < 12; i++) kernel.step(i, Math.round(((i * 37) % 11) - 6) / 2);
  const hash = createHash('sha256');
  for (const cells of [kernel.cover, kernel.grazers])
    if (cells) hash.update(new Uint8Array(cells.buffer, cells.byteOffset, cells.byteLength));
  expect(hash.digest('hex')).toBe(bits);
});
