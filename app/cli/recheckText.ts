import { visibleText } from '../../core/format/index.js';
import type { ChangedNumber } from '../../core/note/life/index.js';
import { textTable } from './textTable.js';
import type { RecheckDocument } from './verbs/recheck.js';

const SEAL_TEXT: Readonly<Record<RecheckDocument['seal'], string>> = {
  intact: 'The note is verified, and nothing in it was changed since.',
  changed: 'The note says that it is verified, but its content is not what was verified.',
  'not sealed': 'The note is not verified.',
};

/** What a recheck found, for people. */
export function recheckText({ holds, seal, values, frames, missing }: RecheckDocument): string {
  const parts = [SEAL_TEXT[seal]];
  parts.push(...missing.map(({ text }) => `Missing: ${visibleText(text)}`));
  parts.push(
    ...frames.map(({ sopInstanceUid, frameNumber, state }) => {
      const frame = frameNumber === null ? '' : `, frame ${frameNumber}`;
      return state === 'missing'
        ? `Missing: image ${visibleText(sopInstanceUid)}${frame}.`
        : `Other pixels than when it was verified: image ${visibleText(sopInstanceUid)}${frame}.`;
    }),
  );
  if (values.length > 0) {
    parts.push(
      textTable(
        ['What', 'Kernel', 'Number', 'In the note', 'Now', 'Image'],
        values.map((one) => [
          one.label,
          one.kernel,
          one.quantity,
          written(one.before),
          written(one.now),
          one.sopInstanceUid ?? '',
        ]),
      ).trimEnd(),
    );
  }
  parts.push(holds ? 'Every value holds.' : 'Not everything holds: see above.');
  return `${parts.join('\n')}\n`;
}

/** All digits: two values that differ must not look the same. */
function written(value: ChangedNumber['before']): string {
  return value === null ? 'none' : String(value);
}
