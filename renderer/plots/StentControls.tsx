import { formatFixed } from '../../core/format/index.js';
import type { NoteProfile, NoteStent } from '../../core/note/index.js';
import { parseMm } from '../panels/parts/parseMm.js';
import { TextField } from '../panels/parts/TextField.js';

export interface StentControlsProps {
  readonly profiles: readonly NoteProfile[];
  readonly stents: readonly NoteStent[];
  /** Identifier of what is shown; '' for nothing. */
  readonly shown: string;
  readonly onShow: (id: string) => void;
  /** Nominal inner diameter of what is shown, mm. */
  readonly nominalMm: number | undefined;
  readonly onNominal: (nominalMm: number | undefined) => void;
  readonly onDelete: () => void;
  readonly onProfile: () => void;
  readonly onStent: () => void;
  readonly disabled: boolean;
}

/** Chooses which profile or fitted stent is shown, takes the nominal diameter, and begins new ones. */
export function StentControls(props: StentControlsProps) {
  const { profiles, stents, shown, nominalMm, disabled } = props;
  const isEmpty = profiles.length + stents.length === 0;
  return (
    <div class="noise-controls">
      {!isEmpty && (
        <select
          class="field"
          aria-label="Show profile or stent"
          title="Choosing one goes to where it lies."
          value={shown}
          onChange={(event) => props.onShow(event.currentTarget.value)}
        >
          <option value="">choose…</option>
          {stents.map((stent) => (
            <option key={stent.id} value={stent.id}>
              {stentText(stent)}
            </option>
          ))}
          {profiles.map((profile) => (
            <option key={profile.id} value={profile.id}>
              {`${profile.label}: visible ${formatFixed(profile.soft?.visibleWidthMm, 2)} / ${formatFixed(profile.sharp?.visibleWidthMm, 2)} mm`}
            </option>
          ))}
        </select>
      )}
      {shown === '' ? (
        <>
          <button
            type="button"
            class="button"
            disabled={disabled}
            title="One click in the lumen, on either plate: the stent is fitted on both kernels at once."
            onClick={props.onStent}
          >
            Fit stent
          </button>
          <button
            type="button"
            class="button"
            disabled={disabled}
            title="Draw a line across the vessel, from outside to outside, on either plate."
            onClick={props.onProfile}
          >
            Draw profile
          </button>
        </>
      ) : (
        <>
          {/* biome-ignore lint/a11y/noLabelWithoutControl: the field is inside */}
          <label title="Nominal inner diameter of the stent, mm; empty for none.">
            Nominal
            <TextField
              bare
              numeric
              look="nominal-mm"
              label="Nominal inner diameter in mm"
              placeholder="–"
              value={nominalMm === undefined ? '' : formatFixed(nominalMm, 2)}
              disabled={disabled}
              onCommit={(text) => {
                const typed = parseMm(text);
                if (typed !== undefined) props.onNominal(typed ?? undefined);
              }}
            />
            mm
          </label>
          <button type="button" class="button" disabled={disabled} onClick={props.onDelete}>
            Delete
          </button>
        </>
      )}
    </div>
  );
}

function stentText({ label, fit }: NoteStent): string {
  if (fit === null) return `${label}: being fitted`;
  return fit.strutDiameterMm === null
    ? `${label}: no fit`
    : `${label}: ${formatFixed(fit.strutDiameterMm.value, 2)} mm, ${formatFixed(fit.lumenHu?.value, 0)} HU`;
}
