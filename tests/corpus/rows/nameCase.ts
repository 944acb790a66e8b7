import { ctSlice } from '../ctSlice.js';
import { PLAIN_STORED } from '../plainSlice.js';
import type { RowCase, Verdict } from '../row.js';

/** A person's name as bytes, and what it is to be read as. */
export interface TextCase {
  readonly verdict?: Verdict;
  readonly code?: string;
  /** (0008,0005), values joined with backslashes; none when left out. */
  readonly set?: string;
  readonly bytes: Uint8Array;
  readonly name: string;
}

/** A slice whose patient's name is these bytes, and must be read as this name. */
export function nameCase(
  title: string,
  { verdict = 'READ', code, set, bytes, name }: TextCase,
): RowCase {
  return {
    name: title,
    verdict,
    ...(code !== undefined && { code }),
    build: () => ({
      slice: ctSlice({
        change: {
          ...(set !== undefined && {
            524293: { tag: 0x00080005, vr: 'CS', value: set },
          }),
          1048592: { tag: 0x00100010, vr: 'PN', value: bytes },
        },
      }),
    }),
    image: { identity: { patientName: name, patientId: 'C-1' } },
    stored: PLAIN_STORED,
  };
}
