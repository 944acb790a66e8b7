import type { Command } from '../../core/commands/index.js';
import type { IdentityText } from './identityText.js';
import { commandKeyText, type KeyNames } from './parts/keyText.js';
import { MenuButton, type MenuItem } from './parts/MenuButton.js';

/** What the header says of the note: what happened last, and the note's two states. */
export interface SaveState {
  readonly kind: 'none' | 'waiting' | 'saving' | 'saved' | 'failed';
  /** Clock time of the last save, as shown: '10:42'. */
  readonly time?: string;
  /** Why saving failed. */
  readonly reason?: string;
  readonly completion?: 'PARTIAL' | 'COMPLETE';
  readonly verification?: 'UNVERIFIED' | 'VERIFIED';
}

export interface HeaderProps {
  /** Undefined while no study is open. */
  readonly identity: IdentityText | undefined;
  readonly synthetic: boolean;
  readonly save: SaveState;
  readonly canPair: boolean;
  /** Files of the folder that are in no stack; undefined while no folder was read. */
  readonly leftOut: number | undefined;
  readonly exports: readonly Command[];
  readonly canExport: boolean;
  /** All other commands of the bench, as a system's menu would hold them. */
  readonly more: readonly MenuItem[];
  readonly keyNames: KeyNames;
  readonly onOpenFolder: () => void;
  readonly onChoosePair: () => void;
  /** A command of the export menu or of the menu of all others. */
  readonly onCommand: (commandId: string) => void;
  readonly onContents: () => void;
  readonly onSave: () => void;
  readonly onCautions: () => void;
}

/** The top line: whose study, whether it is synthetic, what can be done with it, and whether the note is safe. */
export function Header(props: HeaderProps) {
  return (
    <header class="header">
      <h1>Diptych</h1>
      <div class="identity">
        {props.identity ? (
          <span title={[props.identity.name, ...props.identity.details].join(' · ')}>
            <b>
              <bdi>{props.identity.name}</bdi>
            </b>
            {props.identity.details.map((text) => (
              <span key={text} class="dim">
                {' · '}
                <bdi>{text}</bdi>
              </span>
            ))}
          </span>
        ) : (
          <span class="dim">No study open</span>
        )}
      </div>
      {props.synthetic && (
        <span class="synthetic" title="Computed images of no patient">
          SYNTHETIC
        </span>
      )}
      <div class="actions">
        <button type="button" class="button" onClick={props.onOpenFolder}>
          Open folder…
        </button>
        {props.leftOut !== undefined && props.leftOut > 0 && (
          <button
            type="button"
            class="button left-out"
            title="What the folder holds, and why files were left out"
            onClick={props.onContents}
          >
            {props.leftOut} left out
          </button>
        )}
        <button type="button" class="button" disabled={!props.canPair} onClick={props.onChoosePair}>
          Pair…
        </button>
        <MenuButton
          items={props.exports.map((command) => ({
            id: command.id,
            title: command.title,
            keyText: commandKeyText(command, props.keyNames, false),
          }))}
          disabled={!props.canExport}
          toRight
          onChoose={props.onCommand}
        >
          Export
        </MenuButton>
        <MenuButton items={props.more} toRight onChoose={props.onCommand}>
          More
        </MenuButton>
      </div>
      <SaveLine save={props.save} onSave={props.onSave} />
      <button type="button" class="button caution" onClick={props.onCautions}>
        Not a medical device
      </button>
    </header>
  );
}

/** The save state in words: 'Saved 10:42 · partial · unverified'. */
export function saveText(save: SaveState): string {
  const done = {
    none: '',
    waiting: 'Not saved yet',
    saving: 'Saving…',
    saved: save.time === undefined ? 'Saved' : `Saved ${save.time}`,
    failed: 'Not saved',
  }[save.kind];
  const states = [save.completion, save.verification].map((state) => state?.toLowerCase());
  return [done, ...states].filter((text) => text !== undefined && text !== '').join(' · ');
}

function SaveLine({ save, onSave }: { readonly save: SaveState; readonly onSave: () => void }) {
  if (save.kind === 'none') return null;
  const text = saveText(save);
  if (save.kind !== 'failed') return <span class="save-state">{text}</span>;
  return (
    <span class="save-state" role="alert" title={save.reason}>
      <span class="bad">{text}</span>{' '}
      <button type="button" class="link" onClick={onSave}>
        Save again
      </button>
    </span>
  );
}
