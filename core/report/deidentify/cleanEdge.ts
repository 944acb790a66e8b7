import type { NoteEdge } from '../../note/edgeSchema.js';
import { edgeQuote } from '../../note/quoteProposal.js';

/** An edge line without identity: its place and numbers stay, its name is made anew, its images get new UIDs. */
export function cleanEdge(
  edge: NoteEdge,
  { uid, sentence, id }: { uid(uid: string): string; sentence(text: string): string; id: string },
): NoteEdge {
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
      sopInstanceUid: of.sopInstanceUid === null ? null : uid(of.sopInstanceUid),
      frameNumber: of.frameNumber,
      flags: of.flags.map(({ code, text }) => ({ code, text: sentence(text) })),
    };
  const { fromMm, toMm, bandMm, soft, sharp, quote, quoteBy } = edge;
  return {
    id,
    label: `Edge ${id}`,
    fromMm,
    toMm,
    bandMm,
    quote,
    // As of regions: a reason of the program is made anew, one of the reader goes.
    quoteReason: quoteBy === 'proposal' ? edgeQuote(edge).reason : '',
    quoteBy,
    soft: value(soft),
    sharp: value(sharp),
  };
}
