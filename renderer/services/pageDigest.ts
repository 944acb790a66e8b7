import type { Digest } from '../../core/note/life/index.js';

/** SHA-256 by the browser's own library; both shells' addresses are secure contexts, where it is there. */
export const pageDigest: Digest = async (bytes) => {
  const hash = await crypto.subtle.digest('SHA-256', new Uint8Array(bytes));
  return [...new Uint8Array(hash)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
};
