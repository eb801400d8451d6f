import { expose } from 'comlink';
import { drawnFutures } from '#sim-core/weather/drawn-futures.ts';
import { fitRenewal } from '#sim-core/weather/fit-renewal.ts';

/** A thousand futures, or a fit with its intervals, would hold the page up. */
const face = { drawnFutures, fitRenewal };
export type WeatherFace = typeof face;

expose(face);
