import { refuse } from '../../../core/result.js';
import type { Verb } from '../verb.js';

/** `recheck NOTE --in DIR`: not in this version. */
export const recheckVerb = coming('recheck', 'Measure a note again', ['NOTE']);

/** A verb that is known but not there yet. It refuses whatever it is given, and never does half of its work. */
function coming(name: string, summary: string, operands: readonly string[]): Verb {
  return {
    name,
    operands,
    options:
      name === 'recheck' ? [{ name: 'in', value: 'DIR', help: 'folder with the images' }] : [],
    summary: `${summary} (coming: not in this version)`,
    details: 'It refuses, with exit code 2.',
    run: async () =>
      refuse(
        'not-in-this-version',
        `${name} is not in this version of Diptych; a later one has it.`,
      ),
  };
}
