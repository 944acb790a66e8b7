import type { RecentFolder } from '../../app/host/contract.js';
import { visibleText } from '../../core/format/index.js';

export interface WelcomeProps {
  readonly recent: readonly RecentFolder[];
  readonly onOpenFolder: () => void;
  readonly onDemonstration: () => void;
  readonly onRecent: (id: string) => void;
}

/** What the plates' place holds before a study is open. */
export function Welcome(props: WelcomeProps) {
  return (
    <div class="welcome">
      <h2>Two reconstructions, one acquisition</h2>
      <p>
        Open a folder that holds a cardiac CT angiography on a soft and a sharp kernel. Diptych
        finds the pairs and shows what speaks for each.
      </p>
      <div class="row">
        <button type="button" class="button primary" onClick={props.onOpenFolder}>
          Open folder…
        </button>
        <button type="button" class="button" onClick={props.onDemonstration}>
          Open the synthetic demonstration study
        </button>
      </div>
      {props.recent.length > 0 && (
        <div class="recent">
          <h3>Recent folders</h3>
          {props.recent.slice(0, 5).map((folder) => (
            <button
              key={folder.id}
              type="button"
              class="button"
              disabled={folder.missing}
              onClick={() => props.onRecent(folder.id)}
            >
              {visibleText(folder.name)}
              {folder.missing && ' (not there now)'}
            </button>
          ))}
        </div>
      )}
    </div>
  );
}
