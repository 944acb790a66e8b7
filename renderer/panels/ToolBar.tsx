import type { ComponentChildren } from 'preact';
import { useEffect, useRef } from 'preact/hooks';
import type { Command } from '../../core/commands/index.js';
import { ROLES, type Role } from '../../core/region/index.js';
import { indexOfFocus, itemsOf } from './parts/focusMove.js';
import { commandKeyText, type KeyNames } from './parts/keyText.js';
import { MenuButton } from './parts/MenuButton.js';
import { RoleShape } from './parts/RoleSignView.js';
import { lastWord, toolGroups } from './toolGroups.js';

export interface ToolBarProps {
  readonly commands: readonly Command[];
  /** Identifiers of the commands that are on. */
  readonly checked: ReadonlySet<string>;
  /** Identifiers of the commands that can be used now. */
  readonly enabled: ReadonlySet<string>;
  /** The window now, as the plates show it: 'C 300 W 1200'; undefined without an image. */
  readonly windowText: string | undefined;
  readonly letterKeys: boolean;
  readonly keyNames: KeyNames;
  readonly onCommand: (commandId: string) => void;
}

/** The line of tools, made from the table of commands. */
export function ToolBar(props: ToolBarProps) {
  const groups = toolGroups(props.commands);
  const tool = (command: Command) => <ToolButton key={command.id} command={command} bar={props} />;
  const bar = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (bar.current !== null) keepOneTabStop(bar.current);
  });
  return (
    <div
      class="toolbar"
      role="toolbar"
      aria-label="Tools"
      tabIndex={-1}
      ref={bar}
      onKeyDown={onBarKey}
      onFocusIn={() => bar.current !== null && keepOneTabStop(bar.current)}
    >
      <Group name="Look">{groups.look.map(tool)}</Group>
      <Group name="Mark">{groups.mark.map(tool)}</Group>
      <Group name="as" label="Role of new regions" kept>
        {groups.roles.map((command) => (
          <RoleButton key={command.id} command={command} bar={props} />
        ))}
      </Group>
      <Group name="Window" label="Window presets">
        <MenuButton
          label={`Window presets${props.windowText === undefined ? '' : `, now ${props.windowText}`}`}
          disabled={props.windowText === undefined}
          items={groups.windows.map((command) => ({
            id: command.id,
            title: command.title,
            keyText: commandKeyText(command, props.keyNames, props.letterKeys),
            disabled: !props.enabled.has(command.id),
          }))}
          onChoose={props.onCommand}
        >
          {props.windowText ?? 'Presets'}
        </MenuButton>
      </Group>
      <Group name="Link" label="Link both plates" kept>
        {groups.links.map((command) => (
          <LinkButton key={command.id} command={command} bar={props} />
        ))}
      </Group>
      {groups.compare.length > 0 && <Group name="Compare">{groups.compare.map(tool)}</Group>}
    </div>
  );
}

const BAR_BUTTON = '.tool-group button:not(:disabled):not([role])';

/** Tab enters the tool bar once, at the button last used; arrows go on from there (ARIA toolbar pattern). */
function keepOneTabStop(bar: Element): void {
  const buttons = itemsOf(bar, BAR_BUTTON);
  const focused = buttons.find((button) => button === document.activeElement);
  const stop = focused ?? buttons.find((button) => button.tabIndex === 0) ?? buttons[0];
  for (const button of buttons) button.tabIndex = button === stop ? 0 : -1;
}

function onBarKey(event: KeyboardEvent): void {
  if (!(event.currentTarget instanceof Element)) return;
  const step = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
  const buttons = itemsOf(event.currentTarget, BAR_BUTTON);
  const at = indexOfFocus(buttons);
  if (step === undefined || at < 0) return;
  event.preventDefault();
  event.stopPropagation();
  buttons[(at + step + buttons.length) % buttons.length]?.focus();
}

interface GroupProps {
  readonly name: string;
  readonly label?: string;
  /** Its name stays where space is short. */
  readonly kept?: boolean;
  readonly children: ComponentChildren;
}

function Group({ name, label, kept, children }: GroupProps) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: a fieldset is for forms; these are tools
    <div class="tool-group" role="group" aria-label={label ?? name}>
      <span class={kept ? 'group-name kept' : 'group-name'} aria-hidden="true">
        {name}
      </span>
      {children}
    </div>
  );
}

interface ButtonProps {
  readonly command: Command;
  readonly bar: ToolBarProps;
}

function state({ command, bar }: ButtonProps) {
  return {
    type: 'button',
    title: command.title,
    'aria-pressed': bar.checked.has(command.id),
    disabled: !bar.enabled.has(command.id),
    onClick: () => bar.onCommand(command.id),
  } as const;
}

function ToolButton(props: ButtonProps) {
  const key = commandKeyText(props.command, props.bar.keyNames, props.bar.letterKeys);
  return (
    <button class="button" {...state(props)}>
      {props.command.title}
      {key !== undefined && <kbd>{key}</kbd>}
    </button>
  );
}

function RoleButton(props: ButtonProps) {
  const word = lastWord(props.command.id);
  const role: Role | undefined = ROLES.find((one) => one === word);
  const key = commandKeyText(props.command, props.bar.keyNames, props.bar.letterKeys);
  return (
    <button class="button role-button" data-role={role} {...state(props)}>
      {role !== undefined && <RoleShape role={role} />}
      <span class="role-name">{word}</span>
      {key !== undefined && <kbd>{key}</kbd>}
    </button>
  );
}

function LinkButton(props: ButtonProps) {
  const on = props.bar.checked.has(props.command.id);
  // 'Link scrolling' shows as 'scrolling': a part of the name, as those who speak to the machine need it.
  const word = props.command.title.split(' ')[1];
  return (
    <button class="button link-toggle" {...state(props)} aria-label={props.command.title}>
      <svg class="link-sign" width={12} height={10} viewBox="0 0 12 10" aria-hidden="true">
        <path
          d={
            on
              ? 'M4 2H3A3 3 0 0 0 3 8H4M8 2H9A3 3 0 0 1 9 8H8M4 5H8'
              : 'M4 2H3A3 3 0 0 0 3 8H4M8 2H9A3 3 0 0 1 9 8H8'
          }
          fill="none"
          stroke="currentColor"
          stroke-width={1.3}
        />
      </svg>
      {word}
    </button>
  );
}
