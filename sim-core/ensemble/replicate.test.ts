import { expect, it } from 'vitest';
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';
import { toFrame } from '#sim-core/run/frame.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { buffersOf, runReplicate } from './replicate.ts';

const cells = 48;
const grid = { width: 8, height: 6, cellSize: 1, originX: 0, originY: 0, epsg: 32631 };
const ground = {
  capacity: new Uint8Array(cells).fill(255),
  vigour: new Uint8Array(cells).fill(255),
  exposure: new Uint8Array(cells),
  refuge: new Uint8Array(cells),
  fence: new Uint8Array(cells),
  cover: Float32Array.from({ length: cells }, (_, i) => (i % 8 < 3 ? 0.7 : 0)),
};
const spec = runSpecSchema.parse({
  version: 1,
  seed: 'frames',
  surveyYear: 2020,
  years: 3,
  rates: { lateralSpread: 1 },
  layers: { cover: 0.5 },
});
const years = [2020, 2021, 2022, 2023];

it('keeps frames that are the cover of their year and what the digest was made of', () => {
  const { frames, covers, result } = runReplicate(
    { spec, grid, ground },
    { closing: true, coverYears: years, frameYears: years },
  );
  expect([...frames.keys()]).toEqual(years);
  for (const year of years) expect(frames.get(year)).toEqual(toFrame(covers.get(year)!));
  const hash = sha256.create();
  for (const frame of frames.values()) hash.update(frame);
  expect(bytesToHex(hash.digest())).toBe(result.digest);
});

it('keeps frames of years that are not reported too, and hands over every buffer once', () => {
  const some = { ...spec, reportYears: [2023] };
  const kept = runReplicate({ spec: some, grid, ground }, { closing: true, frameYears: [2021] });
  const whole = runReplicate({ spec, grid, ground }, { closing: false, frameYears: [2021] });
  expect(kept.frames).toEqual(whole.frames);
  expect(buffersOf(kept)).toEqual([kept.closing!.buffer, kept.frames.get(2021)!.buffer]);
  expect(buffersOf(whole)).toHaveLength(1);
});
