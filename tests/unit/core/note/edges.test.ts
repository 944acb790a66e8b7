import { describe, expect, it } from 'vitest';
import {
  addEdge,
  addRegion,
  changeEdge,
  measurePlan,
  type Note,
  NoteSchema,
  parsePlan,
  planOf,
  removeEdge,
  slicesNeeded,
  withEdgeValues,
} from '../../../../core/note/index.js';
import { changedNumbers, referencedFrames } from '../../../../core/note/life/index.js';
import { type BandLine, edgeNotMeasured, measureEdgeLine } from '../../../../core/region/index.js';
import { gaussianStep } from '../../../corpus/edgePair.js';
import { sampleStack, sampleState } from '../../renderer/sample.js';

const NOW = '2026-01-10T11:00:00Z';
const LINE: BandLine = { fromMm: [-6, -10, 2], toMm: [7, -10, 2], bandMm: 4 };
const NONE = { soft: null, sharp: null };
const STORED = Int16Array.from({ length: 1600 }, (_, index) =>
  Math.round(600 * gaussianStep((-10 + (index % 40) * 0.5) / 0.7)),
);

function emptyNote(): Note {
  const { note } = sampleState();
  if (note === undefined) throw new Error('no note');
  return note;
}

describe('Edge lines of a note', () => {
  it('are numbered, and a number is not used again after a removal', () => {
    const one = addEdge(emptyNote(), LINE, NONE, NOW);
    expect(one.edge).toEqual({
      id: 'E1',
      label: 'Edge 1',
      ...LINE,
      quote: null,
      quoteReason: 'No rise on either kernel.',
      quoteBy: 'proposal',
      ...NONE,
    });
    const gone = removeEdge(one.note, 'E1', NOW);
    expect(gone.edges).toEqual([]);
    expect(addEdge(gone, LINE, NONE, NOW).edge.id).toBe('E2');
  });

  it('change place and values together, and an unknown one is refused', () => {
    const { note } = addEdge(emptyNote(), LINE, NONE, NOW);
    const soft = edgeNotMeasured({ code: 'no-step', text: 'No clear step.' });
    const moved = changeEdge(note, 'E1', { ...LINE, bandMm: 6 }, { soft, sharp: null }, NOW);
    expect(moved.ok && moved.value.edge).toMatchObject({ id: 'E1', bandMm: 6, soft });
    expect(changeEdge(note, 'E9', LINE, NONE, NOW)).toMatchObject({
      refusal: { code: 'unknown-edge' },
    });
  });

  it('keep what they had on a kernel that can’t be measured now, and then stay the same note', () => {
    const soft = measureEdgeLine(LINE, sampleStack(), () => STORED);
    const { note } = addEdge(emptyNote(), LINE, { soft, sharp: null }, NOW);
    expect(withEdgeValues(note, () => NONE, NOW)).toBe(note);
    const sharp = edgeNotMeasured({ code: 'no-step', text: 'No clear step.' });
    expect(withEdgeValues(note, () => ({ soft: null, sharp }), NOW).edges[0]).toMatchObject({
      soft,
      sharp,
    });
  });

  it('are absent in an older note, and valid in a new one', () => {
    const { edges: _, ...older } = emptyNote();
    expect(NoteSchema.parse(older).edges).toEqual([]);
    const { note } = addEdge(
      emptyNote(),
      LINE,
      { soft: measureEdgeLine(LINE, sampleStack(), () => STORED), sharp: null },
      NOW,
    );
    expect(NoteSchema.parse(JSON.parse(JSON.stringify(note)))).toEqual(note);
  });

  it('are measured from a plan as in the window, and checked again to the last digits', () => {
    const stack = sampleStack();
    const soft = measureEdgeLine(LINE, stack, () => STORED);
    const { note } = addEdge(emptyNote(), LINE, { soft, sharp: soft }, NOW);
    const plan = planOf(note);
    expect(plan.edges).toEqual([{ id: 'E1', ...LINE }]);
    expect(parsePlan(plan)).toMatchObject({ ok: true, value: { plan, unknownFields: [] } });
    expect(slicesNeeded(plan, stack, { soft: stack, sharp: stack })).toEqual([2]);
    const measured = measurePlan(plan, stack, stack, () => STORED);
    if (!measured.ok) throw new Error(measured.refusal.text);
    expect(measured.value.edges).toEqual([{ id: 'E1', soft, sharp: soft }]);
    expect(changedNumbers(note, measured.value)).toEqual([]);
    expect(referencedFrames(note)).toEqual([
      { sopInstanceUid: '2.25.88001.2.3', frameNumber: null },
    ]);
    const other = STORED.map((hu, index) => (index % 40 > 18 ? hu + 50 : hu));
    const changed = measurePlan(plan, stack, undefined, () => other);
    if (!changed.ok) throw new Error(changed.refusal.text);
    expect(changedNumbers(note, changed.value).some(({ quantity }) => quantity === 'riseMm')).toBe(
      true,
    );
  });

  it('are not measured on a stack of another acquisition, and a plan without lines has none', () => {
    const stack = sampleStack();
    const { note } = addEdge(emptyNote(), LINE, NONE, NOW);
    const why = { code: 'other-patient', text: 'Another patient.' };
    const measured = measurePlan(planOf(note), stack, sampleStack(), () => STORED, why);
    expect(measured.ok && measured.value.edges?.[0]?.sharp?.flags).toEqual([why]);
    expect(planOf(emptyNote())).not.toHaveProperty('edges');
    expect(parsePlan({ ...planOf(note), edges: [{ id: 'E1', ...LINE, bandMm: 0.2 }] }).ok).toBe(
      false,
    );
  });

  it('stand beside regions: a region of the same note is not touched', () => {
    const shape = { kind: 'ellipse', centreMm: [0, -10, 2], radiiMm: [2, 2] } as const;
    const { note } = addRegion(emptyNote(), { role: 'lumen', shape, ...NONE }, NOW);
    expect(removeEdge(addEdge(note, LINE, NONE, NOW).note, 'E1', NOW).regions).toBe(note.regions);
  });
});
