import { type ComponentChildren, Fragment } from 'preact';
import { useId, useRef } from 'preact/hooks';
import {
  type NoiseSource,
  NoiseSourceSchema,
  type Note,
  quoteProposal,
  regionQuote,
  stentAtRegion,
} from '../../core/note/index.js';
import { contrastFormula } from '../../core/region/index.js';
import { Inspector } from './Inspector.js';
import { LedgerAcrossRows } from './LedgerAcrossRows.js';
import { LedgerContrastRow } from './LedgerContrastRow.js';
import { LedgerGroupRow } from './LedgerGroupRow.js';
import { LedgerRegionRow } from './LedgerRegionRow.js';
import type { LedgerActions } from './ledgerActions.js';
import { contrastsOf, ledgerGroups } from './ledgerGroups.js';
import { Choice, plainOptions } from './parts/Choice.js';
import { moveFocus } from './parts/focusMove.js';

export interface LedgerProps extends LedgerActions {
  /** Undefined while no pair is open. */
  readonly note:
    | Pick<Note, 'findings' | 'regions' | 'contrasts' | 'noise' | 'stents' | 'profiles'>
    | undefined;
  readonly selectedId: string | undefined;
  /** Verified notes are frozen: nothing can be changed. */
  readonly frozen: boolean;
  /** The line at the foot for what is selected and is no region. */
  readonly foot?: ComponentChildren;
}

const NOISES: readonly NoiseSource[] = NoiseSourceSchema.options;

/** The reading note as a table: regions by finding, their values on both kernels, and the contrasts between them. */
export function Ledger(props: LedgerProps) {
  const headingId = useId();
  const table = useRef<HTMLTableElement>(null);
  const { note } = props;
  const selected = note?.regions.find(({ id }) => id === props.selectedId);
  const onKeyDown = (event: KeyboardEvent) => {
    if (!(event.target instanceof Element) || !event.target.matches('.row-button')) return;
    if (table.current !== null) moveFocus(event, table.current, '.row-button');
  };
  return (
    <section class="ledger" aria-labelledby={headingId}>
      <div class="ledger-head">
        <h2 id={headingId}>Reading note</h2>
        {note !== undefined && (
          <>
            <span class="formula" title="Holds for every contrast of this note">
              {contrastFormula(note.noise)}
            </span>
            <span class="noise">
              <Choice
                label="Noise of contrasts"
                value={note.noise}
                options={plainOptions(NOISES)}
                disabled={props.frozen}
                onChange={props.onNoise}
              />
            </span>
            <button
              type="button"
              class="button outlined"
              disabled={props.frozen || note.regions.length < 2}
              title={note.regions.length < 2 ? 'Mark two regions first' : undefined}
              onClick={props.onNewContrast}
            >
              New contrast…
            </button>
          </>
        )}
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by keyboard */}
      <section class="ledger-scroll" aria-label="Table of the reading note" tabIndex={0}>
        {note === undefined || !hasRows(note) ? (
          <Empty open={note !== undefined} />
        ) : (
          <table ref={table} onKeyDown={onKeyDown}>
            <caption class="visually-hidden">Reading note</caption>
            <LedgerHead />
            <tbody>
              {ledgerGroups(note).map((group) => (
                <Fragment key={group.finding?.id ?? ''}>
                  <LedgerGroupRow group={group} frozen={props.frozen} onFinding={props.onFinding} />
                  {group.regions.map((region) => (
                    <LedgerRegionRow
                      key={region.id}
                      region={region}
                      quote={regionQuote(note, region)}
                      contrasts={contrastsOf(note.contrasts, region.id)}
                      selected={region.id === props.selectedId}
                      onSelect={props.onSelect}
                    />
                  ))}
                </Fragment>
              ))}
              <LedgerAcrossRows
                stents={note.stents}
                profiles={note.profiles}
                selectedId={props.selectedId}
                onSelect={props.onSelect}
              />
              {note.contrasts.length > 0 && (
                <tr class="group">
                  <th scope="rowgroup" colSpan={10}>
                    Contrasts
                  </th>
                </tr>
              )}
              {note.contrasts.map((contrast) => (
                <LedgerContrastRow
                  key={contrast.id}
                  contrast={contrast}
                  regions={note.regions}
                  frozen={props.frozen}
                  onChange={props.onContrast}
                  onDelete={props.onDeleteContrast}
                />
              ))}
            </tbody>
          </table>
        )}
      </section>
      {selected !== undefined && note !== undefined && (
        <Inspector
          key={selected.id}
          region={selected}
          finding={note.findings.find(({ id }) => id === selected.findingId)}
          fitted={stentAtRegion(note, selected)}
          proposal={quoteProposal(note, selected)}
          frozen={props.frozen}
          actions={props}
        />
      )}
      {selected === undefined && props.foot}
    </section>
  );
}

function hasRows({
  regions,
  stents,
  profiles,
}: Pick<Note, 'regions' | 'stents' | 'profiles'>): boolean {
  return regions.length + stents.length + profiles.length > 0;
}

function LedgerHead() {
  return (
    <thead>
      <tr>
        <th scope="col" class="text">
          Region
        </th>
        <th scope="col" class="text">
          Place
        </th>
        <th scope="col">mm²</th>
        <th scope="col">soft HU ± SD</th>
        <th scope="col">
          <span class="visually-hidden">soft </span>SNR
        </th>
        <th scope="col">
          <span class="visually-hidden">soft </span>CNR
        </th>
        <th scope="col">sharp HU ± SD</th>
        <th scope="col">
          <span class="visually-hidden">sharp </span>SNR
        </th>
        <th scope="col">
          <span class="visually-hidden">sharp </span>CNR
        </th>
        <th scope="col" class="text">
          Quote
        </th>
      </tr>
    </thead>
  );
}

function Empty({ open }: { readonly open: boolean }) {
  return (
    <div class="empty">
      {open ? (
        <>
          <p>Nothing is marked yet.</p>
          <p>
            Choose Ellipse or Outline and what it stands for, then draw on either plate: both
            kernels are measured at once.
          </p>
        </>
      ) : (
        <p>Open a folder and choose a pair to begin a reading note.</p>
      )}
    </div>
  );
}
