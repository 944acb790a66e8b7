import {
  type CtImage,
  decodeFrameBytes,
  decodeImage,
  isReadWhole,
  isSameInstance,
  type StoredValues,
} from '../../core/dicom/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { FrameRequest } from '../host/client.js';
import { pageCodecs } from './pageCodecs.js';

/** Fetches one slice's file, or its frame alone, and decodes it. For workers: each of them reads for itself. */
export async function readFrame(
  frame: FrameRequest,
  image: CtImage,
): Promise<Result<StoredValues>> {
  const bytes = await fetchBytes(frame);
  return bytes.ok ? decodeBytes(bytes.value, image) : bytes;
}

async function decodeBytes(bytes: Uint8Array, image: CtImage): Promise<Result<StoredValues>> {
  if (!isReadWhole(image)) return decodeFrameBytes(bytes, image, pageCodecs);
  const decoded = await decodeImage(bytes, { frame: image.frame, codecs: pageCodecs });
  if (!decoded.ok) return decoded;
  const { stored, image: read } = decoded.value;
  return isSameInstance(read, image) && stored.length === image.grid.rows * image.grid.columns
    ? success(stored)
    : refuse('file-changed', CHANGED);
}

const CHANGED = 'This file has changed since the folder was read. Open the folder again.';

async function fetchBytes(frame: FrameRequest): Promise<Result<Uint8Array>> {
  try {
    const response = await fetch(frame.url, {
      headers: frame.headers,
      cache: 'no-store',
    });
    if (!response.ok) {
      return refuse('unreadable', await refusalText(response));
    }
    return success(new Uint8Array(await response.arrayBuffer()));
  } catch (error) {
    if (error instanceof TypeError)
      return refuse('no-answer', 'The file could not be read: the program does not answer.');
    throw error;
  }
}

/** The host's own sentence, where it gives one. */
async function refusalText(response: Response): Promise<string> {
  const isJson = response.headers.get('Content-Type')?.includes('application/json') === true;
  const body: { readonly text?: unknown } = isJson ? await response.json() : {};
  return typeof body.text === 'string'
    ? body.text
    : `The file could not be read (${response.status}).`;
}
