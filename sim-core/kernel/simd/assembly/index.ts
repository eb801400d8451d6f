import { draw } from './draws';
import { feed, grazed, lostToGrazers, moveOn, startGrazers, visit } from './grazers';
import { hear, heardBy, lookAround, spreadRow } from './neighbourhood';
import { clear, nextRun, runEnd } from './runs';
import { weigh } from './chances';
import { comeThrough } from './outcomes';
import {
  alive,
  backgroundLoss,
  counts,
  cover,
  droughtLoss,
  flagStride,
  groups,
  height,
  lastLanes,
  lossWidth,
  lostRow,
  radius,
  skipsBare,
  tolerance,
  width,
} from './state';
import { stretch } from './stretch';
import * as vectors from './vectors';

export { binomialQuantile, drawPair } from './binomial';
export { fence, grazers, grazerTaps, layOutGrazers, setGrazers } from './grazers';
export { words } from './draws';
export { philox } from './philox';
export {
  capacity,
  clumps,
  cover,
  exposure,
  layOut,
  refuge,
  setLoss,
  setLuck,
  setSkip,
  setSpread,
  sites,
  taps,
  vigour,
} from './state';

/** ΣC that the last step lost, in cells. */
export let lostToDrought: f64 = 0;
export let lostToBackground: f64 = 0;
export let lostToGrazing: f64 = 0;

/** Marks what is alive from the cover itself: before the first step, and after others wrote to it. */
export function look(): void {
  for (let y = 0; y < height; y++) {
    const flags = alive + <usize>y * flagStride;
    const cells = cover + ((<usize>y * <usize>width) << 2);
    for (let g = 0; g < groups; g++) {
      const c = v128.load(cells + ((<usize>g) << 4));
      store<u8>(flags + g, !skipsBare || v128.any_true(g + 1 == groups ? v128.and(c, lastLanes) : c) ? 1 : 0);
    }
  }
}

function sum(lanes: v128): f64 {
  return (
    <f64>f32x4.extract_lane(lanes, 0) +
    <f64>f32x4.extract_lane(lanes, 1) +
    (<f64>f32x4.extract_lane(lanes, 2) + <f64>f32x4.extract_lane(lanes, 3))
  );
}

/** Row y: hears what is around, and moves on, in place. */
function advance(y: i32, index: u32): void {
  lookAround(y);
  v128.store(lostRow, i64x2.splat(0));
  v128.store(lostRow, i64x2.splat(0), 16);
  if (grazed) visit(y);
  const heard = heardBy(y);
  for (let g = nextRun(heard, 0, groups); g >= 0; g = nextRun(heard, runEnd, groups)) {
    const end = runEnd;
    for (let from = g; from < end; from += stretch) {
      const to = min(from + stretch, end);
      hear(from, to);
      weigh(y, from, to);
      if (grazed) feed(from, to);
      comeThrough(y, from, to);
      if (counts) draw(y, from, to, index);
    }
  }
  // The row that comes to stand here later starts from nothing.
  clear(heard, flagStride);
  reckonLosses();
  if (grazed) moveOn(y);
}

/** Adds what the present row lost to the losses of the step, by cause. */
function reckonLosses(): void {
  const lost = sum(v128.load(lostRow));
  const grazing = grazed ? sum(v128.load(lostToGrazers)) : 0;
  const alone = backgroundLoss == 0 && !grazed;
  const drought = alone ? lost : droughtLoss == 0 ? 0 : sum(v128.load(lostRow, 16));
  lostToDrought += drought;
  lostToGrazing += grazing;
  // Of three parts that are rounded each, the last may come to less than nothing.
  if (backgroundLoss > 0) lostToBackground += max(0, lost - drought - grazing);
}

/**
 * Neighbourhood, recruitment, loss, next state of the whole map; then grazers. `grazerDecline` is −Δt (m + p (1 − D)), and
 * is not read where there are none.
 */
export function step(index: u32, droughtIndex: f64, grazerDecline: f64): void {
  lostToDrought = 0;
  lostToBackground = 0;
  lostToGrazing = 0;
  if (grazed) startGrazers(grazerDecline);
  vectors.set(vectors.calm, (droughtIndex - tolerance) / lossWidth);
  let spread = 0;
  for (let y = 0; y < height; y++) {
    for (const last = min(height - 1, y + radius); spread <= last; spread++) spreadRow(spread);
    advance(y, index);
  }
}
