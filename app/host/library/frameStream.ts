import type { OpenFrame } from './openFrame.js';
import type { ByteSpan } from './readFrameBytes.js';

const CHUNK_BYTES = 1 << 20;

/**
 * Parts of an open file, one after the other, as a stream that reads when it is asked and closes the file at its
 * end, on cancel and on failure. A file that turns out shorter makes the stream fail; the receiver has the promised
 * length and sees that bytes are missing.
 */
export function frameStream(
  { file }: OpenFrame,
  spans: readonly ByteSpan[],
): ReadableStream<Uint8Array> {
  const waiting = spans.filter(({ length }) => length > 0);
  let done = 0;
  return new ReadableStream<Uint8Array>({
    async start(controller) {
      if (waiting.length > 0) return;
      await file.close();
      controller.close();
    },
    async pull(controller) {
      const [span] = waiting;
      if (span === undefined) throw new Error('read past the end of a stream');
      const bytes = new Uint8Array(Math.min(CHUNK_BYTES, span.length - done));
      try {
        const position = span.start + done;
        const { bytesRead } = await file.read(bytes, 0, bytes.length, position);
        if (bytesRead === 0) throw new Error(`file became shorter: byte ${position}`);
        done += bytesRead;
        controller.enqueue(bytes.subarray(0, bytesRead));
      } catch (error) {
        await file.close();
        controller.error(error);
        return;
      }
      if (done < span.length) return;
      waiting.shift();
      done = 0;
      if (waiting.length > 0) return;
      await file.close();
      controller.close();
    },
    async cancel() {
      await file.close();
    },
  });
}
