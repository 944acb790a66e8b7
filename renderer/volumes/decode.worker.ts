import { expose, transfer } from 'comlink';
import type { DecodeAnswer, DecodeRequest, DecodeWorker } from './decodeRequest.js';
import { readFrame } from './readFrame.js';

const failed = (text: string): DecodeAnswer => ({ ok: false, text });

/** Fetches one file and decodes it. Nothing is kept; a failure is a sentence, so that one bad file stops nothing. */
async function decode(request: DecodeRequest): Promise<DecodeAnswer> {
  const decoded = await readFrame(request.frame, request.image);
  if (!decoded.ok) return failed(decoded.refusal.text);
  const stored = decoded.value;
  if (request.target !== undefined) {
    const { buffer, offsetBytes } = request.target;
    new Uint16Array(buffer, offsetBytes, stored.length).set(
      new Uint16Array(stored.buffer, stored.byteOffset, stored.length),
    );
    return { ok: true, values: undefined };
  }
  const values = ownBuffer(stored);
  return transfer<DecodeAnswer>({ ok: true, values }, [values]);
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
