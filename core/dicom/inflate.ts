import { Inflate } from 'pako';
import { type Result, refuse, success } from '../result.js';

/** No CT slice comes near this; a file that inflates to more is an attack or damage. */
export const INFLATED_BYTES_AT_MOST = 256 * 1024 * 1024;

/**
 * Raw inflate (RFC 1951) of the deflated part of a file, as PS3.5 A.5 asks for, never larger than a limit.
 *
 * @returns the inflated bytes; refused when the stream is damaged, cut, or inflates to more than the limit
 */
export function inflateRaw(
  bytes: Uint8Array,
  bytesAtMost = INFLATED_BYTES_AT_MOST,
): Result<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let total = 0;
  let tooLarge = false;
  const inflate = new Inflate({ raw: true, chunkSize: 1 << 18 });
  inflate.onData = (chunk) => {
    total += chunk.length;
    if (total > bytesAtMost) tooLarge = true;
    else chunks.push(chunk);
  };
  // Pushed in parts, so that a small file which inflates to gigabytes is stopped early.
  const part = 1 << 14;
  for (let start = 0; start < bytes.length && !inflate.ended && !tooLarge; start += part) {
    const end = Math.min(bytes.length, start + part);
    if (!inflate.push(bytes.subarray(start, end), end === bytes.length)) break;
  }
  if (tooLarge) {
    return refuse(
      'inflates-too-far',
      `The deflated data set grows to more than ${bytesAtMost} bytes.`,
    );
  }
  if (!inflate.ended || inflate.err !== 0) {
    return refuse(
      'deflate-damaged',
      'The deflated data set is damaged or cut: it does not inflate.',
    );
  }
  const whole = new Uint8Array(total);
  let at = 0;
  for (const chunk of chunks) {
    whole.set(chunk, at);
    at += chunk.length;
  }
  return success(whole);
}
