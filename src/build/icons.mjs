// @ts-check
/** Draws the add-in's icons: three cells of a hexagonal network, one of them filled to its load. */
import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { deflateSync } from "node:zlib";

const SIZES = [16, 32, 64, 80];

/**
 * How an icon is drawn: its size, how much of the square the drawing fills, and a single colour instead of its own.
 * @typedef {{ size: number, fill?: number, outline?: readonly number[] }} IconShape
 */

/** The two icons inside the package of the unified manifest: full colour with a margin, and a white outline. */
export const PACKAGE_ICON = { size: 192, fill: 0.7 };
export const OUTLINE_ICON = { size: 32, outline: [255, 255, 255] };

const OUTLINE = [24, 60, 92];
const LOADED = [222, 120, 31];
const CALM = [117, 172, 178];
const SAMPLES = 4;

/** Centres of the three hexagons and their radius, in a unit square. */
const RADIUS = 0.27;
const CELLS = [
  { x: 0.5, y: 0.28, colour: LOADED },
  { x: 0.5 - RADIUS * Math.cos(Math.PI / 6), y: 0.28 + 1.5 * RADIUS, colour: CALM },
  { x: 0.5 + RADIUS * Math.cos(Math.PI / 6), y: 0.28 + 1.5 * RADIUS, colour: CALM },
];

/** Largest of the three distances to the sides, as a share of the hexagon's inner radius. */
function hexagon(/** @type {number} */ dx, /** @type {number} */ dy) {
  const inner = RADIUS * Math.cos(Math.PI / 6);
  const sides = [0, 1, 2].map((k) => Math.abs(dx * Math.cos((k * Math.PI) / 3) + dy * Math.sin((k * Math.PI) / 3)));
  return Math.max(...sides) / inner;
}

/**
 * Colour of one point, or undefined where nothing is drawn.
 * @param {number} x
 * @param {number} y
 * @param {readonly number[] | undefined} outline
 */
function sample(x, y, outline) {
  for (const cell of CELLS) {
    const edge = hexagon(x - cell.x, y - cell.y);
    if (edge <= 0.82) return outline ? undefined : cell.colour;
    if (edge <= 1) return outline ?? OUTLINE;
  }
  return undefined;
}

/** @param {IconShape} shape */
export function drawIcon({ size, fill = 1, outline }) {
  const place = (/** @type {number} */ at) => (at / size - 0.5) / fill + 0.5;
  const rows = [];
  for (let y = 0; y < size; y++) {
    const row = [0];
    for (let x = 0; x < size; x++) {
      const sum = [0, 0, 0];
      let hits = 0;
      for (let k = 0; k < SAMPLES * SAMPLES; k++) {
        const colour = sample(
          place(x + ((k % SAMPLES) + 0.5) / SAMPLES),
          place(y + (Math.floor(k / SAMPLES) + 0.5) / SAMPLES),
          outline,
        );
        if (!colour) continue;
        hits++;
        colour.forEach((part, i) => (sum[i] = (sum[i] ?? 0) + part));
      }
      row.push(...sum.map((part) => (hits ? Math.round(part / hits) : 0)), Math.round((255 * hits) / SAMPLES ** 2));
    }
    rows.push(Buffer.from(row));
  }
  return png(size, Buffer.concat(rows));
}

/** Checksum of a PNG chunk; the runtime's own came only with a later Node 20. */
function crc32(/** @type {Buffer} */ bytes) {
  let crc = 0xffffffff;
  for (const byte of bytes) {
    crc ^= byte;
    for (let bit = 0; bit < 8; bit++) crc = (crc >>> 1) ^ (crc & 1 ? 0xedb88320 : 0);
  }
  return (crc ^ 0xffffffff) >>> 0;
}

/**
 * @param {string} type
 * @param {Buffer} data
 */
function chunk(type, data) {
  const body = Buffer.concat([Buffer.from(type, "latin1"), data]);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  body.copy(out, 4);
  out.writeUInt32BE(crc32(body), body.length + 4);
  return out;
}

/**
 * @param {number} size
 * @param {Buffer} pixels rows of RGBA with a filter byte each
 */
function png(size, pixels) {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(size, 0);
  header.writeUInt32BE(size, 4);
  header.set([8, 6, 0, 0, 0], 8);
  return Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    chunk("IHDR", header),
    chunk("IDAT", deflateSync(pixels)),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}

/** @param {string} folder */
export function writeIcons(folder) {
  mkdirSync(folder, { recursive: true });
  for (const size of SIZES) writeFileSync(join(folder, `icon-${size}.png`), drawIcon({ size }));
}
