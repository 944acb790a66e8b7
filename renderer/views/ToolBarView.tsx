import { COMMANDS, type CommandId } from '../../core/commands/index.js';
import { visibleText } from '../../core/format/index.js';
import { windowWords } from '../../core/intensity/index.js';
import { checkedCommands, enabledCommands } from '../commands/commandState.js';
import { useEngine } from '../engine.js';
import { ToolBar } from '../panels/ToolBar.js';
import type { AppState } from '../state/appState.js';
import { keyNames } from './keyNames.js';
import { useSelected } from './useSelected.js';

/** The tool bar, from the state. Lists of commands are compared as text, so that scrolling does not draw it again. */
export function ToolBarView() {
  const { run } = useEngine();
  const enabled = useSelected((state) => enabledCommands(state).join(' '));
  const checked = useSelected((state) => checkedCommands(state).join(' '));
  const windowText = useSelected(shownWindow);
  const letterKeys = useSelected((state) => state.settings.letterKeys);
  return (
    <ToolBar
      commands={COMMANDS}
      checked={new Set(checked.split(' '))}
      enabled={new Set(enabled.split(' '))}
      windowText={windowText}
      letterKeys={letterKeys}
      keyNames={keyNames()}
      onCommand={(id) => run(id as CommandId)}
    />
  );
}

function shownWindow({ pair, plates, active }: AppState): string | undefined {
  if (pair === undefined) return undefined;
  return visibleText(windowWords(plates[active].window));
}
