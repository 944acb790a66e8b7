import type { FolderLevel, Progress, RecentFolder } from '../../app/host/contract.js';
import { visibleText } from '../../core/format/index.js';
import { Dialog } from './Dialog.js';
import { FolderList } from './FolderList.js';
import { ProgressLine } from './ProgressLine.js';

export interface OpenFolderProps {
  /** Undefined while the first level is on its way. */
  readonly level: FolderLevel | undefined;
  readonly recent: readonly RecentFolder[];
  /** A folder is being read. */
  readonly progress: Progress | undefined;
  /** Why the last try failed. */
  readonly problem: string | undefined;
  readonly onEnter: (folderId: string) => void;
  readonly onChoose: (folderId: string) => void;
  readonly onRecent: (id: string) => void;
  readonly onForget: (id: string) => void;
  readonly onForgetAll: () => void;
  readonly onDemonstration: () => void;
  readonly onCancel: () => void;
  readonly onClose: () => void;
}

/** The browser shell's folder chooser: one level at a time, names of folders only. */
export function OpenFolder(props: OpenFolderProps) {
  const { level, progress } = props;
  const busy = progress !== undefined;
  return (
    <Dialog
      title="Open folder"
      size="wide"
      onClose={props.onClose}
      foot={
        progress ? (
          <ProgressLine progress={progress} onCancel={props.onCancel} />
        ) : (
          <>
            <span class="note">
              {level && `“${visibleText(level.name)}” and its subfolders will be read.`}
            </span>
            <button type="button" class="button" onClick={props.onClose}>
              Cancel
            </button>
            <button
              type="button"
              class="button primary"
              disabled={level === undefined || level.refusal !== undefined}
              onClick={() => level && props.onChoose(level.id)}
            >
              Open this folder
            </button>
          </>
        )
      }
    >
      {props.problem !== undefined && (
        <p class="bad" role="alert">
          {props.problem}
        </p>
      )}
      <div class="folders">
        <div>
          <Trail level={level} disabled={busy} onEnter={props.onEnter} />
          <FolderList level={level} disabled={busy} onEnter={props.onEnter} />
        </div>
        <div class="aside">
          <Places level={level} disabled={busy} onEnter={props.onEnter} />
          <Recent {...props} disabled={busy} />
          <div>
            <h3>Without images of your own</h3>
            <button
              type="button"
              class="button outlined"
              disabled={busy}
              onClick={props.onDemonstration}
            >
              Open the demonstration study
            </button>
            <p class="source">Synthetic: computed images of no patient.</p>
          </div>
        </div>
      </div>
    </Dialog>
  );
}

interface LevelProps {
  readonly level: FolderLevel | undefined;
  readonly disabled: boolean;
  readonly onEnter: (folderId: string) => void;
}

function Trail({ level, disabled, onEnter }: LevelProps) {
  return (
    <nav class="trail" aria-label="Folders above">
      {level?.trail.map((folder, i) => (
        <span key={folder.id}>
          {i > 0 && <span aria-hidden="true">›</span>}
          <button
            type="button"
            class="button"
            disabled={disabled}
            aria-current={folder.id === level.id ? 'true' : undefined}
            onClick={() => onEnter(folder.id)}
          >
            {visibleText(folder.name)}
          </button>
        </span>
      ))}
    </nav>
  );
}

function Places({ level, disabled, onEnter }: LevelProps) {
  const roots = level?.roots ?? [];
  if (roots.length === 0) return null;
  return (
    <div class="recent">
      <h3>Places</h3>
      <ul>
        {roots.map((place) => (
          <li key={place.id}>
            <button
              type="button"
              class="entry"
              disabled={disabled}
              onClick={() => onEnter(place.id)}
            >
              {visibleText(place.name)}
            </button>
          </li>
        ))}
      </ul>
    </div>
  );
}

function Recent(props: OpenFolderProps & { readonly disabled: boolean }) {
  if (props.recent.length === 0) return null;
  return (
    <div class="recent">
      <h3>Recent folders</h3>
      <ul>
        {props.recent.map((folder) => (
          <li key={folder.id}>
            <button
              type="button"
              class="entry"
              disabled={props.disabled || folder.missing}
              title={folder.missing ? 'This folder is not there now' : undefined}
              onClick={() => props.onRecent(folder.id)}
            >
              {visibleText(folder.name)}
              {folder.missing && ' (not there)'}
            </button>
            <button
              type="button"
              class="button icon-button"
              aria-label={`Forget ${folder.name}`}
              title="Forget"
              disabled={props.disabled}
              onClick={() => props.onForget(folder.id)}
            >
              ×
            </button>
          </li>
        ))}
      </ul>
      <button
        type="button"
        class="button outlined"
        disabled={props.disabled}
        onClick={props.onForgetAll}
      >
        Clear recent
      </button>
      <p class="dim">
        Also deletes what was kept of the headers of these folders, names among it, to open them
        faster. Images and notes stay.
      </p>
    </div>
  );
}
