import { describe, expect, it } from 'vitest';
import type { Note } from '../../../../core/note/index.js';
import { type Result, refuse, success } from '../../../../core/result.js';
import { createAutosave } from '../../../../renderer/services/autosave.js';
import type { SaveState } from '../../../../renderer/state/appState.js';
import { sampleState } from '../sample.js';

function sampleNote(comment: string): Note {
  const { note } = sampleState();
  if (note === undefined) throw new Error('invalid sample: no note');
  return { ...note, comment };
}

/** A stand-in for the host: it keeps what it is told, answers when it is let, and refuses a tag that is not its last one. */
function standInHost() {
  const written: { readonly comment: string; readonly etag: string | undefined }[] = [];
  const held: (() => void)[] = [];
  let etag: string | undefined;
  let isDown = false;
  const states: SaveState[] = [];
  const autosave = createAutosave({
    client: {
      writeNote: async (_study, note, given): Promise<Result<string>> => {
        await new Promise<void>((resolve) => held.push(resolve));
        if (isDown) return refuse('unreachable', 'The disk is full.');
        if (given !== etag) return refuse('conflict', 'Another version is there.');
        written.push({ comment: note.comment, etag: given });
        etag = `"${written.length}"`;
        return success(etag);
      },
    },
    onState: (state) => states.push(state),
    timeOfDay: () => '10:42',
    signal: new AbortController().signal,
  });
  return {
    autosave,
    written,
    states,
    kinds: () => states.map(({ kind }) => kind),
    /** Lets every write that waits go on, and those that follow. */
    letThrough: async () => {
      for (let turn = 0; turn < 20; turn++) {
        held.splice(0).forEach((go) => {
          go();
        });
        await Promise.resolve();
      }
      await autosave.settled();
    },
    otherWindowWrites: () => {
      etag = '"other"';
    },
    setDown: (down: boolean) => {
      isDown = down;
    },
  };
}

describe('Keeping the note', () => {
  it('writes a change that is undone while it is being written, and then the note before it', async () => {
    const host = standInHost();
    const before = sampleNote('before');
    host.autosave.begin(before, undefined);
    host.autosave.save(sampleNote('deleted'));
    host.autosave.save(before);
    await host.letThrough();
    expect(host.written.map(({ comment }) => comment)).toEqual(['deleted', 'before']);
  });

  it('writes a first change without a tag, and the next with the tag of the first', async () => {
    const host = standInHost();
    host.autosave.begin(sampleNote(''), undefined);
    host.autosave.save(sampleNote('one'));
    await host.letThrough();
    host.autosave.save(sampleNote('two'));
    await host.letThrough();
    expect(host.written).toEqual([
      { comment: 'one', etag: undefined },
      { comment: 'two', etag: '"1"' },
    ]);
    expect(host.kinds()).toEqual(['none', 'saving', 'saved', 'saving', 'saved']);
    expect(host.states.at(-1)).toEqual({ kind: 'saved', at: '10:42' });
  });

  it('holds one note in its queue: what came in between is left out', async () => {
    const host = standInHost();
    host.autosave.begin(sampleNote(''), undefined);
    for (const comment of ['one', 'two', 'three', 'four']) host.autosave.save(sampleNote(comment));
    await host.letThrough();
    expect(host.written.map(({ comment }) => comment)).toEqual(['one', 'four']);
  });

  it('writes nothing for the note that was opened', async () => {
    const host = standInHost();
    const note = sampleNote('kept');
    host.autosave.begin(note, '"1"');
    host.autosave.save(note);
    await host.letThrough();
    expect(host.written).toEqual([]);
  });

  it('keeps a new note that holds nothing when it is asked to by hand', async () => {
    const host = standInHost();
    const note = sampleNote('');
    host.autosave.begin(note, undefined);
    host.autosave.saveNow(note);
    await host.letThrough();
    expect(host.written).toHaveLength(1);
  });

  it('writes no more once another window has written, and says so', async () => {
    const host = standInHost();
    host.autosave.begin(sampleNote(''), undefined);
    host.autosave.save(sampleNote('one'));
    await host.letThrough();
    host.otherWindowWrites();
    host.autosave.save(sampleNote('two'));
    await host.letThrough();
    host.autosave.save(sampleNote('three'));
    await host.letThrough();
    expect(host.written.map(({ comment }) => comment)).toEqual(['one']);
    const last = host.states.at(-1);
    expect(last?.kind).toBe('conflict');
    expect(last).toMatchObject({ text: expect.stringContaining('Another window') });
  });

  it('tries again at the next change after a failure, with the newest note', async () => {
    const host = standInHost();
    host.autosave.begin(sampleNote(''), undefined);
    host.setDown(true);
    host.autosave.save(sampleNote('one'));
    await host.letThrough();
    expect(host.states.at(-1)).toEqual({
      kind: 'failed',
      text: 'The note is not saved. The disk is full.',
    });
    host.setDown(false);
    host.autosave.save(sampleNote('two'));
    await host.letThrough();
    expect(host.written).toEqual([{ comment: 'two', etag: undefined }]);
    expect(host.states.at(-1)?.kind).toBe('saved');
  });

  it('writes nothing beside a kept note that can’t be read', async () => {
    const host = standInHost();
    host.autosave.beginUnsaved(sampleNote(''), 'The kept note is broken.');
    host.autosave.saveNow(sampleNote('one'));
    await host.letThrough();
    expect(host.written).toEqual([]);
    expect(host.states).toEqual([{ kind: 'conflict', text: 'The kept note is broken.' }]);
  });
});
