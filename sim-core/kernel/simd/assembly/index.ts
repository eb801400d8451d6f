import { draw } from './draws';
import { ahead, gather, startRow } from './gather';
import { feed, grazed, lostToGrazers, moveOn, startGrazers, visit } from './grazers';
import { hear, lookAround, spreadRow } from './neighbourhood';
import { clear, mark, markWhere } from './runs';
import { weigh } from './chances';
import { comeThrough } from './outcomes';
import {
  alive,
  backgroundLoss,
  bitStride,
  counts,
  cover,
  droughtLoss,
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
import * as vectors from './vectors';

export { binomialQuantile, drawPair } from './binomial';
export { fence, grazers, grazerTaps, layOutGrazers, setGrazers } from './grazers';
export { layGround, refugeAt, setRefuge } from './ground';
export { words } from './draws';
export { philox } from './philox';
export { clumps, cover, groundRow, layOut, setLoss, setLuck, setSkip, setSpread, sites, taps } from './state';

/** ΣC that the last step lost, in cells. */
export let lostToDrought: f64 = 0;
export let lostToBackground: f64 = 0;
export let lostToGrazing: f64 = 0;

/** Marks what is alive from the cover itself: before the first step, and after others wrote to it. */
export function look(): void {
  for (let y = 0; y < height; y++) {
    const living = alive + <usize>y * bitStride;
    clear(living, bitStride);
    if (!skipsBare) {
      mark(living, 0, groups);
      continue;
    }
    const cells = cover + ((<usize>y * <usize>width) << 2);
    for (let from = 0; from < groups; from += 64) {
      let word: u64 = 0;
      for (let g = from; g < min(from + 64, groups); g++) {
        const c = v128.load(cells + ((<usize>g) << 4));
        word |= (<u64>v128.any_true(g + 1 == groups ? v128.and(c, lastLanes) : c)) << (g - from);
      }
      markWhere(living, from, word);
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
  // What hears nothing is bare; what lives at the end of the step is marked anew.
  if (skipsBare) clear(alive + <usize>y * bitStride, bitStride);
  startRow();
  while (ahead >= 0) {
    const many = gather(y);
    hear();
    weigh(many);
    if (grazed) feed();
    comeThrough(y);
    if (counts) draw(y, index);
  }
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
