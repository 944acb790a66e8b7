import type { Command } from '../../core/commands/index.js';

/** The table of commands cut into the groups of the tool bar, each in the table's order. */
export interface ToolGroups {
  /** Tools that change the view. */
  readonly look: readonly Command[];
  /** Tools that make regions. */
  readonly mark: readonly Command[];
  readonly roles: readonly Command[];
  readonly windows: readonly Command[];
  readonly links: readonly Command[];
  readonly compare: readonly Command[];
}

export function toolGroups(commands: readonly Command[]): ToolGroups {
  const tools = commands.filter((command) => command.group === 'tool');
  const named = (prefix: string) => commands.filter((command) => command.id.startsWith(prefix));
  return {
    look: tools.filter((command) => command.menu === 'View'),
    mark: tools.filter((command) => command.menu !== 'View'),
    roles: commands.filter((command) => command.group === 'role'),
    windows: named('window.'),
    links: named('link.'),
    compare: commands.filter((command) => command.group === 'compare'),
  };
}

/** 'link.scroll' → 'scroll': the last word of a command's name. */
export function lastWord(commandId: string): string {
  return commandId.slice(commandId.lastIndexOf('.') + 1);
}
