import { useId, useState } from 'preact/hooks';
import {
  type ContrastParts,
  type NoiseSource,
  NoiseSourceSchema,
  type NoteRegion,
} from '../../core/note/index.js';
import { contrastFormula, type Role } from '../../core/region/index.js';
import { Dialog } from './Dialog.js';

export interface NewContrastProps {
  readonly regions: readonly NoteRegion[];
  /** The note's noise, with which the dialog begins. */
  readonly noise: NoiseSource;
  readonly selectedId: string | undefined;
  /** Why the last try was refused. */
  readonly problem: string | undefined;
  readonly onCreate: (parts: ContrastParts) => void;
  readonly onClose: () => void;
}

const NOISE_TEXTS: Readonly<Record<NoiseSource, string>> = {
  lumen: 'SD of the lumen',
  wall: 'SD of the wall',
  reference: 'SD of a reference region',
  pooled: 'SD of lumen and wall, pooled',
};

/** A contrast between two regions: lumen, wall and noise are chosen with the formula in view. */
export function NewContrast(props: NewContrastProps) {
  const { regions } = props;
  const first = (role: Role) => regions.find((region) => region.role === role)?.id ?? '';
  const selected = regions.find(({ id, role }) => id === props.selectedId && role === 'lumen');
  const [lumen, setLumen] = useState(selected?.id ?? first('lumen'));
  const [wall, setWall] = useState(first('wall') || first('plaque') || first('fat'));
  const [noise, setNoise] = useState(props.noise);
  const [reference, setReference] = useState(first('reference'));
  const needsReference = noise === 'reference';
  const complete =
    lumen !== '' && wall !== '' && lumen !== wall && (!needsReference || reference !== '');

  const create = () =>
    props.onCreate({ lumen, wall, noise, ...(needsReference ? { reference } : {}) });

  return (
    <Dialog
      title="New contrast"
      onClose={props.onClose}
      foot={
        <>
          <span class="note">{lumen !== '' && lumen === wall && 'Choose two regions.'}</span>
          <button type="button" class="button" onClick={props.onClose}>
            Cancel
          </button>
          <button type="button" class="button primary" disabled={!complete} onClick={create}>
            Add to the note
          </button>
        </>
      }
    >
      {props.problem !== undefined && (
        <p class="bad" role="alert">
          {props.problem}
        </p>
      )}
      <div class="form-grid">
        <RegionSelect label="Lumen" regions={regions} value={lumen} onChange={setLumen} />
        <RegionSelect label="Wall or tissue" regions={regions} value={wall} onChange={setWall} />
        <NoiseSelect value={noise} onChange={setNoise} />
        {needsReference && (
          <RegionSelect
            label="Reference"
            regions={regions}
            value={reference}
            onChange={setReference}
          />
        )}
      </div>
      <p class="formula-line">{contrastFormula(noise)}</p>
    </Dialog>
  );
}

interface RegionSelectProps {
  readonly label: string;
  readonly regions: readonly NoteRegion[];
  readonly value: string;
  readonly onChange: (regionId: string) => void;
}

function RegionSelect({ label, regions, value, onChange }: RegionSelectProps) {
  const id = useId();
  return (
    <>
      <label for={id}>{label}</label>
      <select
        id={id}
        class="field"
        value={value}
        onChange={(event) => onChange(event.currentTarget.value)}
      >
        <option value="">Choose a region</option>
        {regions.map((region) => (
          <option key={region.id} value={region.id}>
            {region.place === '' ? region.label : `${region.label} · ${region.place}`}
          </option>
        ))}
      </select>
    </>
  );
}

interface NoiseSelectProps {
  readonly value: NoiseSource;
  readonly onChange: (noise: NoiseSource) => void;
}

function NoiseSelect({ value, onChange }: NoiseSelectProps) {
  const id = useId();
  return (
    <>
      <label for={id}>Noise</label>
      <select
        id={id}
        class="field"
        value={value}
        onChange={(event) => {
          const chosen = NoiseSourceSchema.safeParse(event.currentTarget.value);
          if (chosen.success) onChange(chosen.data);
        }}
      >
        {NoiseSourceSchema.options.map((noise) => (
          <option key={noise} value={noise}>
            {NOISE_TEXTS[noise]}
          </option>
        ))}
      </select>
    </>
  );
}
