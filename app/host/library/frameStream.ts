import type { OpenFrame } from './openFrame.js';
import type { ByteSpan } from './readFrameBytes.js';

const CHUNK_BYTES = 1 << 20;

/**
 * A part of an open file as a stream that reads when it is asked and closes the file at its end, on
 * cancel and on failure. A file that turns out shorter makes the stream fail; the receiver has the
 * promised length and sees that bytes are missing.
 */
export function frameStream(
  { file }: OpenFrame,
  { start, length }: ByteSpan,
): ReadableStream<Uint8Array> {
  let position = start;
  const end = start + length;
  return new ReadableStream<Uint8Array>({
    async start(controller) {
      if (length > 0) return;
      await file.close();
      controller.close();
    },
    async pull(controller) {
      const bytes = new Uint8Array(Math.min(CHUNK_BYTES, end - position));
      try {
        const { bytesRead } = await file.read(bytes, 0, bytes.length, position);
        if (bytesRead === 0) throw new Error(`file became shorter: byte ${position}`);
        position += bytesRead;
        controller.enqueue(bytes.subarray(0, bytesRead));
      } catch (error) {
        await file.close();
        controller.error(error);
        return;
      }
      if (position === end) {
        await file.close();
        controller.close();
      }
    },
    async cancel() {
      await file.close();
    },
  });
}
