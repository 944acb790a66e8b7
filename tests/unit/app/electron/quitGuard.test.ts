import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { pageState, SAVE_LIMIT_MS, savePage } from '../../../../app/electron/pageState.js';
import { quitGuard } from '../../../../app/electron/quitGuard.js';
import {
  nextQuit,
  OPEN,
  type QuitEvent,
  type QuitState,
} from '../../../../app/electron/quitState.js';
import {
  decisionOf,
  NOT_SAVED_QUESTION,
  UNSAVED_QUESTION,
} from '../../../../app/electron/unsaved.js';

const SAVE = 0;
const DISCARD = 1;
const CANCEL = 2;

describe('nextQuit', () => {
  const asking: QuitState = { quitRequested: false, asking: true, mayClose: false };
  const settled: QuitState = { quitRequested: false, asking: false, mayClose: true };

  it.each<[string, QuitState, QuitEvent, QuitState, string]>([
    ['a close with nothing unsaved goes through', OPEN, 'close-attempted', OPEN, 'let-close'],
    [
      'a close with unsaved changes is asked about',
      OPEN,
      'close-attempted-unsaved',
      asking,
      'hold-and-ask',
    ],
    ['a second close while asking only waits', asking, 'close-attempted-unsaved', asking, 'hold'],
    ['so does one that has nothing unsaved any more', asking, 'close-attempted', asking, 'hold'],
    ['a quit is remembered', OPEN, 'quit-requested', { ...OPEN, quitRequested: true }, 'none'],
    [
      'a quit while asking turns the close into a quit',
      asking,
      'quit-requested',
      { ...asking, quitRequested: true },
      'none',
    ],
    ['settling a close closes the window', asking, 'settled', settled, 'close-window'],
    [
      'settling a quit quits',
      { ...asking, quitRequested: true },
      'settled',
      { ...settled, quitRequested: true },
      'quit-app',
    ],
    ['cancelling forgets all', { ...asking, quitRequested: true }, 'cancelled', OPEN, 'none'],
    [
      'after settling nothing is asked again',
      settled,
      'close-attempted-unsaved',
      settled,
      'let-close',
    ],
    [
      'the end of the session asks nothing',
      asking,
      'session-ending',
      { quitRequested: true, asking: false, mayClose: true },
      'none',
    ],
  ])('%s', (_name, state, event, next, step) => {
    expect(nextQuit(state, event)).toEqual({ state: next, step });
  });
});

describe('the questions', () => {
  it.each([UNSAVED_QUESTION, NOT_SAVED_QUESTION])(
    'have Cancel as the last button and as escape',
    (question) => {
      expect(question.buttons).toHaveLength(3);
      expect(question.buttons?.[2]).toBe('Cancel');
      expect(question).toMatchObject({ cancelId: 2, defaultId: 0 });
    },
  );

  it('offer Save, Don’t save, Cancel', () => {
    expect(UNSAVED_QUESTION.buttons).toEqual(['Save', 'Don’t save', 'Cancel']);
  });

  it.each([
    [0, 'save'],
    [1, 'discard'],
    [2, 'cancel'],
    [3, 'cancel'],
    [-1, 'cancel'],
  ])('button %i means %s', (response, decision) => expect(decisionOf(response)).toBe(decision));
});

describe('quitGuard', () => {
  /** @param answers buttons pressed, in order; @param saves whether each save succeeds */
  function guarded(answers: readonly number[], saves: readonly boolean[] = [], unsaved = true) {
    const calls: string[] = [];
    const left = { answers: [...answers], saves: [...saves], unsaved };
    const guard = quitGuard({
      hasUnsaved: () => left.unsaved,
      save: async () => {
        calls.push('save');
        const saved = left.saves.shift() ?? false;
        if (saved) left.unsaved = false;
        return saved;
      },
      ask: async (question) => {
        calls.push(question === UNSAVED_QUESTION ? 'ask' : 'ask again');
        const answer = left.answers.shift();
        if (answer === undefined) throw new Error('the window is gone');
        return answer;
      },
      closeWindow: () => calls.push('close'),
      reloadPage: () => calls.push('reload'),
      quitApp: () => calls.push('quit'),
      report: (error) => calls.push(`report ${String(error)}`),
    });
    return { guard, calls, left, settle: () => new Promise((done) => setTimeout(done, 0)) };
  }

  it('lets a window close that has nothing unsaved', () => {
    const { guard, calls } = guarded([], [], false);
    expect(guard.close()).toBe(false);
    expect(calls).toEqual([]);
  });

  it('saves, then closes', async () => {
    const { guard, calls, settle } = guarded([SAVE], [true]);
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls).toEqual(['ask', 'save', 'close']);
    expect(guard.close()).toBe(false);
    expect(guard.unload()).toBe(true);
  });

  it('closes without saving when told to, and overrules the page', async () => {
    const { guard, calls, settle } = guarded([DISCARD]);
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls).toEqual(['ask', 'close']);
    expect(guard.close()).toBe(false);
    expect(guard.unload()).toBe(true);
  });

  it('stays open on Cancel, and asks again the next time', async () => {
    const { guard, calls, settle } = guarded([CANCEL, CANCEL]);
    expect(guard.close()).toBe(true);
    await settle();
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls).toEqual(['ask', 'ask']);
  });

  it('asks once however often closing is tried meanwhile', async () => {
    const { guard, calls, settle } = guarded([CANCEL]);
    expect([guard.close(), guard.close(), guard.close()]).toEqual([true, true, true]);
    await settle();
    expect(calls).toEqual(['ask']);
  });

  it('quits after saving when quitting was meant', async () => {
    const { guard, calls, settle } = guarded([SAVE], [true]);
    guard.beforeQuit();
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls).toEqual(['ask', 'save', 'quit']);
  });

  it('forgets quitting on Cancel, so that a later close only closes', async () => {
    const { guard, calls, settle } = guarded([CANCEL, DISCARD]);
    guard.beforeQuit();
    guard.close();
    await settle();
    guard.close();
    await settle();
    expect(calls).toEqual(['ask', 'ask', 'close']);
  });

  it('never closes after a save that failed, unless told to', async () => {
    const { guard, calls, settle } = guarded([SAVE, SAVE, CANCEL], [false, false]);
    guard.close();
    await settle();
    expect(calls).toEqual(['ask', 'save', 'ask again', 'save', 'ask again']);
    expect(guard.unload()).toBe(false);
  });

  it('holds a reload, and repeats it after the answer', async () => {
    const { guard, calls, settle } = guarded([SAVE], [true]);
    expect(guard.unload()).toBe(false);
    await settle();
    expect(calls).toEqual(['ask', 'save', 'reload']);
    // The reload that the reader has agreed to may overrule the page once, and only once.
    expect(guard.unload()).toBe(true);
    expect(guard.unload()).toBe(false);
  });

  it('does not reload on Cancel', async () => {
    const { guard, calls, settle } = guarded([CANCEL]);
    expect(guard.unload()).toBe(false);
    await settle();
    expect(calls).toEqual(['ask']);
  });

  it('asks about closing when the page objects although it had reported nothing unsaved', async () => {
    const { guard, calls, settle } = guarded([DISCARD], [], false);
    expect(guard.close()).toBe(false);
    expect(guard.unload()).toBe(false);
    await settle();
    expect(calls).toEqual(['ask', 'close']);
  });

  it('stays open and says so when asking itself fails', async () => {
    const { guard, calls, left, settle } = guarded([]);
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls).toEqual(['ask', 'report Error: the window is gone']);
    left.answers.push(DISCARD);
    expect(guard.close()).toBe(true);
    await settle();
    expect(calls.slice(2)).toEqual(['ask', 'close']);
  });

  it('saves without a question when the system shuts down', async () => {
    const { guard, calls } = guarded([], [true]);
    expect(await guard.sessionEnd()).toBe(true);
    expect(calls).toEqual(['save']);
    expect(guard.close()).toBe(false);
  });
});

describe('savePage', () => {
  beforeEach(() => void vi.useFakeTimers());
  afterEach(() => void vi.useRealTimers());

  const UNSAVED = { enabled: [], checked: [], unsaved: true, title: '' };

  it('asks nothing of a page that has nothing unsaved, or has not spoken', async () => {
    const page = pageState();
    const sent: string[] = [];
    expect(await savePage(page, (id) => sent.push(id))).toBe(true);
    page.report({ ...UNSAVED, unsaved: false });
    expect(await savePage(page, (id) => sent.push(id))).toBe(true);
    expect(sent).toEqual([]);
  });

  it('sends note.save and waits for the page to say that it is saved', async () => {
    const page = pageState();
    page.report(UNSAVED);
    const sent: string[] = [];
    const saved = savePage(page, (id) => sent.push(id));
    expect(sent).toEqual(['note.save']);
    page.report({ ...UNSAVED, title: 'still saving' });
    await vi.advanceTimersByTimeAsync(SAVE_LIMIT_MS - 1);
    page.report({ ...UNSAVED, unsaved: false });
    expect(await saved).toBe(true);
    expect(vi.getTimerCount()).toBe(0);
  });

  it('is false when the page does not say so in ten seconds', async () => {
    const page = pageState();
    page.report(UNSAVED);
    const saved = savePage(page, () => undefined);
    await vi.advanceTimersByTimeAsync(10_000);
    expect(await saved).toBe(false);
  });

  it('is false when the page goes', async () => {
    const page = pageState();
    page.report(UNSAVED);
    const saved = savePage(page, () => undefined);
    page.report(undefined);
    expect(await saved).toBe(false);
    expect(vi.getTimerCount()).toBe(0);
  });
});
