import { describe, expect, it } from 'vitest';
import { checkedCommands, isEnabled } from '../../../../renderer/commands/commandState.js';
import { INITIAL_STATE } from '../../../../renderer/state/initialState.js';
import { sampleStack, sampleState } from '../sample.js';

describe('What can be used', () => {
  it('is opening, settings and help before anything is open', () => {
    expect(isEnabled(INITIAL_STATE, 'folder.open')).toBe(true);
    expect(isEnabled(INITIAL_STATE, 'help.cautions')).toBe(true);
    expect(isEnabled(INITIAL_STATE, 'tool.ellipse')).toBe(false);
    expect(isEnabled(INITIAL_STATE, 'export.csv')).toBe(false);
  });

  it('does not hold what needs a region, a step back or a second region', () => {
    const state = sampleState();
    expect(isEnabled(state, 'tool.ellipse')).toBe(true);
    expect(isEnabled(state, 'edit.undo')).toBe(false);
    expect(isEnabled(state, 'region.delete')).toBe(false);
    expect(isEnabled(state, 'contrast.new')).toBe(false);
  });

  it('does not hold windows in HU for a stack that has none', () => {
    const soft = sampleStack({ unit: 'stored' });
    expect(isEnabled(sampleState({ soft }), 'window.vessel')).toBe(false);
    expect(isEnabled(sampleState({ soft }), 'window.file')).toBe(true);
  });
});

describe('What is on', () => {
  it('is the tool, the role, the links and the smoothing', () => {
    expect(checkedCommands(sampleState())).toEqual([
      'tool.window',
      'view.smooth',
      'compare.open',
      'link.scroll',
      'link.window',
      'link.view',
      'role.lumen',
    ]);
  });
});
