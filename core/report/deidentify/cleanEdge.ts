import type { NoteEdge } from '../../note/edgeSchema.js';
import { edgeQuote } from '../../note/quoteProposal.js';
import { type Cleaner, cleanFlag, cleanPlaneReference, cleanUid } from './cleaner.js';

/** An edge line without identity: its place and numbers stay, its name is made anew, its images get new UIDs. */
export function cleanEdge(edge: NoteEdge, cleaner: Cleaner): NoteEdge {
  const value = (of: NoteEdge['soft']): NoteEdge['soft'] =>
    of && {
      riseMm: of.riseMm,
      riseErrorMm: of.riseErrorMm,
      crossingsMm: of.crossingsMm,
      blurFwhmMm: of.blurFwhmMm,
      blurErrorMm: of.blurErrorMm,
      fromHu: of.fromHu,
      toHu: of.toHu,
      atMm: of.atMm,
      n: of.n,
      sliceIndex: of.sliceIndex,
      sliceOffsetMm: of.sliceOffsetMm,
      sopInstanceUid: cleanUid(of.sopInstanceUid, cleaner),
      frameNumber: of.frameNumber,
      flags: of.flags.map((flag) => cleanFlag(flag, cleaner)),
    };
  const { fromMm, toMm, bandMm, soft, sharp, quote, quoteBy } = edge;
  const id = cleaner.ids.idOf(edge.id);
  return {
    id,
    label: `Edge ${id}`,
    fromMm,
    toMm,
    bandMm,
    ...cleanPlaneReference(edge, cleaner),
    quote,
    // As of regions: a reason of the program is made anew, one of the reader goes.
    quoteReason: quoteBy === 'proposal' ? edgeQuote(edge).reason : '',
    quoteBy,
    soft: value(soft),
    sharp: value(sharp),
  };
}
