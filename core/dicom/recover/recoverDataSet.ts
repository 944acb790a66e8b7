import { type Finding, type Result, refuse, success } from '../../result.js';
import {
  type ElementHead,
  type Layout,
  readHead,
  readTag,
  UNDEFINED_LENGTH,
} from './elementHead.js';
import { findLayout } from './findLayout.js';
import { skipSequence } from './skipSequence.js';

const PIXEL_DATA = 0x7fe00010;

/** One element of the top level, as it stands in the bytes. */
export interface RecoveredElement {
  readonly tag: number;
  readonly vr: string;
  readonly valueAt: number;
  readonly length: number;
}

/** A data set that the ordinary parser does not read, walked element by element up to its Pixel Data. */
export interface RecoveredDataSet {
  readonly bytes: Uint8Array;
  readonly layout: Layout;
  readonly statedSyntax?: string;
  readonly elements: readonly RecoveredElement[];
  /** Head of Pixel Data; undefined when the data set ends without it. Length may be undefined (0xffffffff). */
  readonly pixelData?: RecoveredElement;
  readonly findings: readonly Finding[];
}

/**
 * Reads what others wrote wrongly but readably: no preamble, no or wrong transfer syntax, unknown VR, broken
 * private sequences. Only the top level; sequences are stepped over. Lengths are checked before anything is made.
 */
export function recoverDataSet(file: Uint8Array, hasPreamble: boolean): Result<RecoveredDataSet> {
  const found = findLayout(file, hasPreamble);
  if (!found.ok) return found;
  const { bytes, layout, start } = found.value;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const elements: RecoveredElement[] = [];
  let guessed = 0;
  let at = start;
  let pixelData: RecoveredElement | undefined;
  while (at < bytes.length && pixelData === undefined) {
    const head = readHead(view, at, layout);
    if (head === undefined) return refuseHead(view, at, layout);
    if (head.guessed) guessed++;
    if (head.tag === PIXEL_DATA) {
      pixelData = head;
      break;
    }
    const end = endOf(view, head, layout);
    if (!end.ok) return end;
    if (head.length !== UNDEFINED_LENGTH) elements.push(head);
    at = end.value;
  }
  const vrFinding: Finding = {
    code: 'vr-guessed',
    text: `${guessed} attribute(s) have no valid value representation; the dictionary was used.`,
  };
  return success({
    bytes,
    layout,
    elements,
    ...(found.value.statedSyntax !== undefined && { statedSyntax: found.value.statedSyntax }),
    ...(pixelData && { pixelData }),
    findings: guessed > 0 ? [...found.value.findings, vrFinding] : found.value.findings,
  });
}

function endOf(view: DataView, head: ElementHead, layout: Layout): Result<number> {
  const tag = tagWords(head.tag);
  if (head.length !== UNDEFINED_LENGTH) {
    if (head.length > view.byteLength - head.valueAt) {
      return refuse('cut-header', `The file ends at byte ${view.byteLength}, inside ${tag}.`, {
        tag,
        offset: head.valueAt,
      });
    }
    return success(head.valueAt + head.length);
  }
  if (head.vr !== 'SQ' && head.vr !== 'UN' && layout.explicitVr) {
    return refuse('undefined-length', `${tag} has no length, which only sequences may lack.`, {
      tag,
      offset: head.at,
    });
  }
  const end = skipSequence(view, head, layout);
  const isPrivate = ((head.tag >>> 16) & 1) === 1;
  if (end.ok || !isPrivate || end.refusal.code === 'nested-too-deep') return end;
  return skipToDelimiter(view, head, layout) ?? end;
}

/** Past a private sequence that breaks the rules: to a delimiter behind which the data set goes on. */
function skipToDelimiter(
  view: DataView,
  head: ElementHead,
  layout: Layout,
): Result<number> | undefined {
  for (let at = head.valueAt; at + 8 <= view.byteLength; at += 2) {
    if (readTag(view, at, layout) !== 0xfffee0dd) continue;
    const next = readHead(view, at + 8, layout);
    if (next !== undefined && next.tag > head.tag && !next.guessed) return success(at + 8);
  }
  return undefined;
}

function refuseHead(view: DataView, at: number, layout: Layout): Result<never> {
  if (view.byteLength - at < 12) {
    return refuse(
      'cut-header',
      `The file ends at byte ${view.byteLength}, in the head of an element.`,
      {
        offset: at,
      },
    );
  }
  const tag = tagWords(readTag(view, at, layout));
  return refuse(
    'bad-vr',
    `${tag} at byte ${at} can't be read: its value representation and length make no sense.`,
    {
      tag,
      offset: at,
    },
  );
}

function tagWords(tag: number): string {
  const hex = tag.toString(16).padStart(8, '0');
  return `(${hex.slice(0, 4)},${hex.slice(4)})`;
}
