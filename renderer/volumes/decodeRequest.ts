import type { CtImage } from '../../core/dicom/index.js';
import type { FrameRequest } from '../host/client.js';

/** What a worker needs to read one slice: where its bytes are, what must come out, and where to put it. */
export interface DecodeRequest {
  /** Of the whole file, or of the encoded frame alone where the slice is not read whole. */
  readonly frame: FrameRequest;
  /** The slice as the index has it. */
  readonly image: CtImage;
  /** The volume's buffer, where it is shared; else the worker hands its own buffer over. */
  readonly target: { readonly buffer: SharedArrayBuffer; readonly offsetBytes: number } | undefined;
}

/** What a worker answers: the values are in the shared buffer, or in the buffer that comes with the answer. */
export type DecodeAnswer =
  | { readonly ok: true; readonly values: ArrayBuffer | undefined }
  | { readonly ok: false; readonly text: string };

/** The worker as the page sees it. */
export interface DecodeWorker {
  decode(request: DecodeRequest): Promise<DecodeAnswer>;
}
