import type { z } from 'zod';
import type { CtImage } from '../../../core/dicom/index.js';
import { parseJson } from '../storage/jsonFile.js';
import {
  CACHE_FORMAT,
  CacheSchema,
  type Part,
  type PartsSchema,
  type SlimImage,
  type SlimImageSchema,
} from './cacheSchema.js';
import type { FileReading } from './readFileHeader.js';

/** A reading that stands for its file as long as the file stays in its state. */
export type LastingReading = Required<FileReading>;

/** Readings by path, relative to the folder. */
export type CachedReadings = ReadonlyMap<string, LastingReading>;

/** Whose readings they are: of which folder, by which version of the reader. */
export interface CacheOwner {
  readonly root: string;
  readonly reader: string;
}

/** The text of a cache file. It holds what the headers say of patients: keep it from others. */
export function cacheText({ root, reader }: CacheOwner, readings: CachedReadings): string {
  const tables = {
    imageType: createTable(),
    identity: createTable(),
    acquisition: createTable(),
    grid: createTable(),
    pixels: createTable(),
    windows: createTable(),
    findings: createTable(),
  } satisfies Record<Part, Table>;
  const slim = (image: CtImage): SlimImage => {
    const { positionMm, ...grid } = image.grid;
    return {
      ...image,
      imageType: tables.imageType.place(image.imageType),
      identity: tables.identity.place(image.identity),
      acquisition: tables.acquisition.place(image.acquisition),
      grid: tables.grid.place(grid),
      positionMm,
      pixels: tables.pixels.place(image.pixels),
      windows: tables.windows.place(image.windows),
      findings: tables.findings.place(image.findings),
    };
  };
  const files = Array.from(readings, ([path, { reading, stamp }]) => ({
    path,
    state: stamp,
    found:
      reading.kind === 'image'
        ? {
            images: reading.images.map(slim),
            ...(reading.leftOut !== undefined && { leftOut: reading.leftOut }),
          }
        : { code: reading.code, text: reading.text },
  }));
  const parts = Object.fromEntries(
    Object.entries(tables).map(([part, { values }]) => [part, values]),
  );
  return JSON.stringify({ format: CACHE_FORMAT, reader, root, parts, files });
}

/**
 * The readings of a cache file's text. None when it is another folder's, another version's, or has not
 * exactly the shape that it is written with: a cache is never half believed.
 */
export function readingsOfCache(text: string, { root, reader }: CacheOwner): CachedReadings {
  const parsed = CacheSchema.safeParse(parseJson(text));
  if (!parsed.success || parsed.data.root !== root || parsed.data.reader !== reader) {
    return new Map();
  }
  const { parts, files } = parsed.data;
  const readings = new Map<string, LastingReading>();
  for (const { path, state, found } of files) {
    if ('code' in found) {
      readings.set(path, { reading: { kind: 'leftOut', ...found }, stamp: state });
      continue;
    }
    const [first, ...rest] = found.images.map((image) => wholeImage(image, parts));
    if (first === undefined) return new Map();
    const others = rest.filter((image) => image !== undefined);
    if (others.length !== rest.length) return new Map();
    const { leftOut } = found;
    const left = leftOut !== undefined && { leftOut };
    const reading = { kind: 'image', images: [first, ...others], ...left } as const;
    readings.set(path, { reading, stamp: state });
  }
  return readings;
}

/** Undefined when a place is in no table. */
function wholeImage(
  { positionMm, ...slim }: z.output<typeof SlimImageSchema>,
  parts: z.output<typeof PartsSchema>,
): CtImage | undefined {
  const imageType = parts.imageType[slim.imageType];
  const identity = parts.identity[slim.identity];
  const acquisition = parts.acquisition[slim.acquisition];
  const grid = parts.grid[slim.grid];
  const pixels = parts.pixels[slim.pixels];
  const windows = parts.windows[slim.windows];
  const findings = parts.findings[slim.findings];
  if (!imageType || !identity || !acquisition || !grid || !pixels || !windows || !findings) {
    return undefined;
  }
  return {
    ...slim,
    imageType,
    identity,
    acquisition,
    grid: { positionMm, ...grid },
    pixels,
    windows,
    findings,
  };
}

interface Table {
  readonly values: unknown[];
  place(value: object): number;
}

/** Equal values have one place; those that are the same object are not even compared. */
function createTable(): Table {
  const values: unknown[] = [];
  const byObject = new Map<object, number>();
  const byText = new Map<string, number>();
  return {
    values,
    place(value) {
      const known = byObject.get(value);
      if (known !== undefined) return known;
      const asText = JSON.stringify(value);
      const index = byText.get(asText) ?? values.push(value) - 1;
      byText.set(asText, index);
      byObject.set(value, index);
      return index;
    },
  };
}
