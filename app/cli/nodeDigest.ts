import { createHash } from 'node:crypto';
import type { Digest } from '../../core/note/life/index.js';

/** SHA-256 by Node's own library. */
export const nodeDigest: Digest = async (bytes) => createHash('sha256').update(bytes).digest('hex');
