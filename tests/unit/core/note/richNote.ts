import {
  addContrast,
  addRegion,
  changeRegion,
  type Note,
  setFinding,
} from '../../../../core/note/index.js';
import type { Role } from '../../../../core/region/index.js';
import type { Result } from '../../../../core/result.js';
import { ellipse, emptyNote, NOW, pair, values } from './noteFixture.js';

function got<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

const images = await pair();

/** A note with a lumen in a stent, a wall, a reference and an outlined plaque, all measured, and one contrast. */
export function richNote(): Note {
  const parts: readonly (readonly [Role, number])[] = [
    ['lumen', 8],
    ['wall', 14],
    ['reference', 20],
  ];
  const measured = parts.reduce((note, [role, column]) => {
    const shape = ellipse(column, 9);
    return addRegion(note, { role, shape, ...values(images, shape) }, NOW).note;
  }, emptyNote(images));
  const shape = {
    kind: 'outline',
    pointsMm: [
      [-8.1, -16.2, 2],
      [-6.9, -16.2, 2],
      [-7.5, -14.8, 2],
    ],
  } as const;
  const outlined = addRegion(
    measured,
    { role: 'plaque', shape, ...values(images, shape) },
    NOW,
  ).note;
  const found = got(
    setFinding(
      outlined,
      'L1',
      { segment: 7, kind: 'stent', nominalMm: 3, assessability: 'limited', reason: 'motion' },
      NOW,
    ),
  );
  const quoted = got(
    changeRegion(found, 'L1', { place: 'in stent', quote: 'sharp', quoteReason: 'struts' }, NOW),
  ).note;
  const { note } = got(addContrast(quoted, { lumen: 'L1', wall: 'W1' }, NOW));
  // The files of the fixture say that they are synthetic; the note of a patient's study does not.
  return { ...note, synthetic: false };
}
