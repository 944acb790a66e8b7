import type { BandLine, EdgeValue } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import type { NoteEdge } from './edgeSchema.js';
import { nextNumber, rememberedNumbers } from './numbering.js';
import { edgeQuote } from './quoteProposal.js';
import type { Quoted } from './quoteSchema.js';
import type { Note } from './schema.js';
import { touched } from './touched.js';

/** Letter that begins the identifier of an edge line. */
export const EDGE_LETTER = 'E';

/** What an edge line measures on both kernels; null on a kernel where it was not measured. */
export interface EdgeValues {
  readonly soft: EdgeValue | null;
  readonly sharp: EdgeValue | null;
}

/** Adds an edge line under the next free name: 'E2', 'Edge 2'. */
export function addEdge(
  note: Note,
  line: BandLine & { readonly plane?: string | undefined },
  { soft, sharp }: EdgeValues,
  now: string,
): { readonly note: Note; readonly edge: NoteEdge } {
  const { id, number, lastNumbers } = nextNumber(note, EDGE_LETTER);
  const { fromMm, toMm, bandMm, plane } = line;
  const { quote, reason: quoteReason } = edgeQuote({ soft, sharp });
  const edge: NoteEdge = {
    id,
    label: `Edge ${number}`,
    fromMm,
    toMm,
    bandMm,
    ...(plane === undefined ? {} : { plane }),
    quote,
    quoteReason,
    quoteBy: 'proposal',
    soft,
    sharp,
  };
  return { note: touched(note, { edges: [...note.edges, edge], lastNumbers }, now), edge };
}

/** Gives an edge line another place; it comes with what it measures there. */
export function changeEdge(
  note: Note,
  id: string,
  { fromMm, toMm, bandMm }: BandLine,
  { soft, sharp }: EdgeValues,
  now: string,
): Result<{ readonly note: Note; readonly edge: NoteEdge }> {
  const present = note.edges.find((edge) => edge.id === id);
  if (present === undefined) return refuse('unknown-edge', `The note has no edge line ${id}.`);
  const edge: NoteEdge = { ...present, fromMm, toMm, bandMm, soft, sharp };
  const edges = note.edges.map((other) => (other.id === id ? edge : other));
  return success({ note: touched(note, { edges }, now), edge });
}

/** Takes the reader's choice of the kernel to quote for an edge line, or gives it back to the proposal. */
export function changeEdgeQuote(
  note: Note,
  id: string,
  change: Partial<Quoted>,
  now: string,
): Result<Note> {
  const present = note.edges.find((edge) => edge.id === id);
  if (present === undefined) return refuse('unknown-edge', `The note has no edge line ${id}.`);
  const edges = note.edges.map((other) => (other.id === id ? { ...present, ...change } : other));
  return success(touched(note, { edges }, now));
}

/** Removes an edge line; its number is not used again. */
export function removeEdge(note: Note, id: string, now: string): Note {
  const edges = note.edges.filter((edge) => edge.id !== id);
  if (edges.length === note.edges.length) return note;
  return touched(note, { edges, lastNumbers: rememberedNumbers(note) }, now);
}

/**
 * The note with every edge line measured anew; a kernel that can't be measured now (null) keeps what it had. The same
 * note comes back where nothing has changed.
 */
export function withEdgeValues(
  note: Note,
  measure: (edge: NoteEdge) => EdgeValues,
  now: string,
): Note {
  const edges = note.edges.map((edge): NoteEdge => {
    const { soft, sharp } = measure(edge);
    const next = { ...edge, soft: soft ?? edge.soft, sharp: sharp ?? edge.sharp };
    return JSON.stringify(next) === JSON.stringify(edge) ? edge : next;
  });
  const isSame = edges.every((edge, index) => edge === note.edges[index]);
  return isSame ? note : touched(note, { edges }, now);
}
