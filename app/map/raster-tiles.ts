import { BufferImageSource, Container, GlProgram, Mesh, MeshGeometry, Shader, UniformGroup } from 'pixi.js';
import type { MapColours, Rgb } from './map-colours.ts';
import { sameTexels, toTexels, type MapRaster } from './map-raster.ts';
import { rasterFragment, rasterVertex } from './raster-shader.ts';
import { copyTile, splitTiles, type Tile } from './split-tiles.ts';

interface TileParts {
  readonly tile: Tile;
  readonly shader: Shader;
  readonly mesh: Mesh<MeshGeometry, Shader>;
  texels: BufferImageSource | undefined;
  ground: BufferImageSource | undefined;
}

/** What a tile's cells are read from, by the shader's names. */
const resources = { texels: 'uTexels', ground: 'uGround' } as const;

const bytes = (resource: Uint8Array, width: number, height: number) =>
  new BufferImageSource({
    resource,
    width,
    height,
    format: 'r8unorm',
    scaleMode: 'nearest',
    alphaMode: 'no-premultiply-alpha',
  });

const quad = ({ column, row, width, height }: Tile) =>
  new MeshGeometry({
    positions: Float32Array.of(
      column,
      row,
      column + width,
      row,
      column + width,
      row + height,
      column,
      row + height,
    ),
    uvs: Float32Array.of(0, 0, width, 0, width, height, 0, height),
    indices: Uint32Array.of(0, 1, 2, 0, 2, 3),
  });

const vec4 = ([r, g, b]: Rgb) => Float32Array.of(r / 255, g / 255, b / 255, 1);

/** The raster on the graphics card: one texture of bytes, or as many tiles as the card's limit asks for. */
export class RasterTiles {
  readonly container = new Container();
  readonly #columns: number;
  readonly #palette = new BufferImageSource({
    resource: new Uint8Array(256 * 4),
    width: 256,
    height: 1,
    format: 'rgba8unorm',
    scaleMode: 'nearest',
    alphaMode: 'no-premultiply-alpha',
  });
  readonly #bare = bytes(Uint8Array.of(255), 1, 1);
  readonly #look = new UniformGroup({
    uWater: { value: new Float32Array(4), type: 'vec4<f32>' },
    uShore: { value: new Float32Array(4), type: 'vec4<f32>' },
    uStanding: { value: new Float32Array(4), type: 'vec4<f32>' },
    uHasGround: { value: 0, type: 'f32' },
    uCellsPerPixel: { value: 1, type: 'f32' },
  });
  readonly #parts: TileParts[];
  #raster: MapRaster | undefined;

  /** @param limit largest side of a texture, texels */
  constructor(width: number, height: number, limit: number) {
    this.#columns = width;
    const glProgram = GlProgram.from({
      vertex: rasterVertex,
      fragment: rasterFragment,
      name: 'foothold-raster',
    });
    this.#parts = splitTiles(width, height, limit).map((tile) => {
      const shader = new Shader({
        glProgram,
        resources: { uTexels: this.#bare, uGround: this.#bare, uPalette: this.#palette, look: this.#look },
      });
      const mesh = new Mesh<MeshGeometry, Shader>({ geometry: quad(tile), shader });
      this.container.addChild(mesh);
      return { tile, shader, mesh, texels: undefined, ground: undefined };
    });
  }

  /** Until it is filled, a tile shares one cell with all others, so that a bare map costs no upload. */
  #fill(part: TileParts, name: keyof typeof resources, values: Uint8Array) {
    const { tile, shader } = part;
    const whole = this.#parts.length === 1;
    let source = part[name];
    if (source) {
      if (whole) source.resource = values;
    } else {
      source = bytes(whole ? values : new Uint8Array(tile.width * tile.height), tile.width, tile.height);
      part[name] = source;
      (shader.resources as Record<string, unknown>)[resources[name]] = source;
    }
    if (!whole) copyTile(values, this.#columns, tile, source.resource as Uint8Array);
    source.update();
  }

  /** One upload a tile, where the cells changed; shares are kept, not copied, where one texture is enough. */
  setRaster(raster: MapRaster) {
    const last = this.#raster;
    this.#raster = raster;
    if (last && sameTexels(last, raster)) return;
    const values = toTexels(raster);
    for (const part of this.#parts) this.#fill(part, 'texels', values);
  }

  /** Capacity of the ground, where cells of 0 are water; undefined where the raster speaks for itself. */
  setGround(capacity: Uint8Array | undefined) {
    this.#look.uniforms.uHasGround = capacity ? 1 : 0;
    if (!capacity) return;
    for (const part of this.#parts) this.#fill(part, 'ground', capacity);
  }

  setPalette(palette: Uint8Array, colours: MapColours) {
    this.#palette.resource = palette;
    this.#palette.update();
    const { uniforms } = this.#look;
    uniforms.uWater = vec4(colours.water);
    uniforms.uShore = vec4(colours.shore);
    uniforms.uStanding = vec4(colours.standing);
  }

  /** @param scale side of a cell, CSS px */
  setScale(scale: number) {
    this.#look.uniforms.uCellsPerPixel = 1 / scale;
  }

  destroy() {
    this.container.destroy();
    for (const { texels, ground, mesh, shader } of this.#parts) {
      const { geometry } = mesh;
      mesh.destroy();
      shader.destroy();
      geometry.destroy();
      texels?.destroy();
      ground?.destroy();
    }
    this.#palette.destroy();
    this.#bare.destroy();
  }
}
