import { expose, transfer } from 'comlink';
import { decodeImage } from '../../core/dicom/index.js';
import type { DecodeAnswer, DecodeRequest, DecodeWorker } from './decodeRequest.js';

const failed = (text: string): DecodeAnswer => ({ ok: false, text });

/** Fetches one file and decodes it. Nothing is kept; a failure is a sentence, so that one bad file stops nothing. */
async function decode(request: DecodeRequest): Promise<DecodeAnswer> {
  const bytes = await fetchBytes(request);
  if (typeof bytes === 'string') return failed(bytes);
  const decoded = await decodeImage(bytes);
  if (!decoded.ok) return failed(decoded.refusal.text);
  const { image, stored } = decoded.value;
  const pixels = request.rows * request.columns;
  if (image.sopInstanceUid !== request.sopInstanceUid || stored.length !== pixels) {
    return failed('This file has changed since the folder was read. Open the folder again.');
  }
  if (request.target !== undefined) {
    const { buffer, offsetBytes } = request.target;
    new Uint16Array(buffer, offsetBytes, pixels).set(
      new Uint16Array(stored.buffer, stored.byteOffset, stored.length),
    );
    return { ok: true, values: undefined };
  }
  const values = ownBuffer(stored);
  return transfer<DecodeAnswer>({ ok: true, values }, [values]);
}

async function fetchBytes(request: DecodeRequest): Promise<Uint8Array | string> {
  try {
    const response = await fetch(request.frame.url, {
      headers: request.frame.headers,
      cache: 'no-store',
    });
    if (!response.ok) return `The file could not be read (${response.status}).`;
    return new Uint8Array(await response.arrayBuffer());
  } catch (error) {
    if (error instanceof TypeError)
      return 'The file could not be read: the program does not answer.';
    throw error;
  }
}

/** The values in a buffer of their own, without a copy where they have one already. */
function ownBuffer(stored: Int16Array | Uint16Array): ArrayBuffer {
  const { buffer, byteOffset, byteLength } = stored;
  if (buffer instanceof ArrayBuffer && byteOffset === 0 && byteLength === buffer.byteLength) {
    return buffer;
  }
  return new Uint8Array(new Uint8Array(buffer, byteOffset, byteLength)).buffer;
}

expose({ decode } satisfies DecodeWorker);
