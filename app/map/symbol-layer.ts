import { CanvasSource, Particle, ParticleContainer, Rectangle, Texture } from 'pixi.js';
import { cellAt, type Grid } from '#sim-core/grid/grid.ts';
import type { MapColours } from './map-colours.ts';
import type { MapFoothold } from './map-symbols.ts';

const side = 32;
/** of what is not there yet: still to be seen on every ramp */
const faintness = 0.45;
const kinds = ['surveyed', 'planned', 'clump'] as const;
type Kind = (typeof kinds)[number];
const layerOf: Record<Kind, number> = { surveyed: 0, clump: 1, planned: 2 };
/** The point on the ground inside its square of the sheet, px. */
const anchors: Record<Kind, readonly [number, number]> = {
  surveyed: [16, 16],
  planned: [10, 24],
  clump: [16, 16],
};

/** One sheet with all symbols, drawn once a theme and pixel ratio, so that 20,000 of them are one draw call. */
function drawSheet(colours: MapColours, pixelRatio: number): HTMLCanvasElement {
  const canvas = document.createElement('canvas');
  canvas.width = side * kinds.length * pixelRatio;
  canvas.height = side * pixelRatio;
  const pen = canvas.getContext('2d');
  if (!pen) throw new Error('The browser gives no 2D canvas to draw map symbols on');
  pen.scale(pixelRatio, pixelRatio);
  pen.lineJoin = 'round';
  const stroke = (d: string, colour: string, width: number) => {
    pen.strokeStyle = colour;
    pen.lineWidth = width;
    pen.stroke(new Path2D(d));
  };
  pen.translate(...anchors.surveyed);
  const diamond = 'M0-3.900L3.900 0 0 3.900-3.900 0z';
  stroke(diamond, colours.halo, 4);
  pen.fillStyle = colours.halo;
  pen.fill(new Path2D(diamond));
  stroke(diamond, colours.ink, 1.3);
  pen.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
  pen.translate(side + anchors.planned[0], anchors.planned[1]);
  stroke('M0 0V-12.500M0-12.500h8.500v5.600h-8.500', colours.halo, 4);
  pen.fillStyle = colours.flag;
  pen.fill(new Path2D('M0-12.600h8.600v6h-8.600z'));
  stroke('M0 0V-13', colours.ink, 1.5);
  pen.fillStyle = colours.ink;
  pen.fill(new Path2D('M-1.700 0a1.700 1.700 0 1 0 3.400 0a1.700 1.700 0 1 0-3.400 0'));
  pen.setTransform(pixelRatio, 0, 0, pixelRatio, 0, 0);
  pen.translate(2 * side + anchors.clump[0], anchors.clump[1]);
  const dot = new Path2D('M-2.600 0a2.600 2.600 0 1 0 5.200 0a2.600 2.600 0 1 0-5.200 0');
  pen.strokeStyle = colours.ink;
  pen.lineWidth = 1.6;
  pen.stroke(dot);
  pen.fillStyle = colours.flag;
  pen.fill(dot);
  return canvas;
}

/** Footholds as particles that keep their size while the ground below them is zoomed. */
export class SymbolLayer {
  readonly container = new ParticleContainer({ dynamicProperties: { vertex: false, position: false } });
  #textures: Record<Kind, Texture> | undefined;
  #source: CanvasSource | undefined;
  #particles: Particle[] = [];
  #size = 1;
  #clumpSize = 1;

  setSheet(colours: MapColours, pixelRatio: number) {
    const source = new CanvasSource({
      resource: drawSheet(colours, pixelRatio),
      resolution: pixelRatio,
      scaleMode: 'linear',
    });
    const at = (i: number) => new Texture({ source, frame: new Rectangle(i * side, 0, side, side) });
    const textures = { surveyed: at(0), planned: at(1), clump: at(2) };
    const kindOf = new Map(kinds.map((kind) => [this.#textures?.[kind], kind]));
    for (const particle of this.#particles)
      particle.texture = textures[kindOf.get(particle.texture) ?? 'surveyed'];
    this.container.texture = textures.surveyed;
    this.container.update();
    this.#destroySheet();
    this.#textures = textures;
    this.#source = source;
  }

  setFootholds(footholds: readonly MapFoothold[], grid: Grid) {
    const textures = this.#textures;
    if (!textures) throw new Error('The symbols have no sheet yet: call setSheet first');
    // Surveyed ones below; flags on top, from north to south, so that none hides behind a pole.
    const inOrder = footholds
      .filter((f) => cellAt(grid, f.x, f.y))
      .sort((a, b) => (a.kind === b.kind ? b.y - a.y : layerOf[a.kind] - layerOf[b.kind]));
    this.#particles = inOrder.map(
      ({ kind, x, y, faint }) =>
        new Particle({
          alpha: faint ? faintness : 1,
          texture: textures[kind],
          x: (x - grid.originX) / grid.cellSize,
          y: (grid.originY - y) / grid.cellSize,
          anchorX: anchors[kind][0] / side,
          anchorY: anchors[kind][1] / side,
          scaleX: kind === 'clump' ? this.#clumpSize : this.#size,
          scaleY: kind === 'clump' ? this.#clumpSize : this.#size,
        }),
    );
    this.container.particleChildren = this.#particles;
    this.container.update();
  }

  /**
   * @param size side of the symbols as a share of full size, in cells a CSS px
   * @param clumps the same of the dots of clumps
   */
  setSize(size: number, clumps: number) {
    if (size === this.#size && clumps === this.#clumpSize) return;
    this.#size = size;
    this.#clumpSize = clumps;
    for (const particle of this.#particles) {
      const side = particle.texture === this.#textures?.clump ? clumps : size;
      particle.scaleX = side;
      particle.scaleY = side;
    }
    this.container.update();
  }

  #destroySheet() {
    for (const kind of kinds) this.#textures?.[kind].destroy();
    // Pixi's own particle shader holds on to its last sheet, and complains of one that is destroyed under it.
    this.#source?.unload();
  }

  destroy() {
    this.container.destroy();
    this.#destroySheet();
  }
}
