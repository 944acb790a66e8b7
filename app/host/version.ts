import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';
import { packageRoot } from './packageRoot.js';

const PackageSchema = z.object({ name: z.literal('diptych'), version: z.string() });

/** The program's version, as its package.json has it. */
export function programVersion(): string {
  const text = readFileSync(join(packageRoot(), 'package.json'), 'utf8');
  return PackageSchema.parse(JSON.parse(text)).version;
}
