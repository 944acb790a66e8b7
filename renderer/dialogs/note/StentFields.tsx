import type { FindingFields, NoteFinding } from '../../../core/note/index.js';
import { segmentOf } from '../../../core/note/index.js';
import { Choice } from '../../panels/parts/Choice.js';
import { parseMm } from '../../panels/parts/parseMm.js';
import { TextField } from '../../panels/parts/TextField.js';

export interface StentFieldsProps {
  readonly findings: readonly NoteFinding[];
  readonly frozen: boolean;
  readonly onFinding: (findingId: string, fields: FindingFields) => void;
}

const OVERLAP = [
  { value: 'unsaid', text: 'not said' },
  { value: 'no', text: 'no' },
  { value: 'yes', text: 'yes' },
] as const;

/** What is known of each stent beside its numbers. */
export function StentFields({ findings, frozen, onFinding }: StentFieldsProps) {
  const stents = findings.filter(({ kind }) => kind === 'stent');
  if (stents.length === 0) return null;
  return (
    <section class="settings" aria-label="Stents">
      <h3>Stents</h3>
      {stents.map((stent) => (
        <fieldset key={stent.id} class="stent-fields" disabled={frozen}>
          <legend>{titleOf(stent)}</legend>
          <Millimetres
            label="Nominal diameter, mm"
            value={stent.nominalMm}
            frozen={frozen}
            onValue={(nominalMm) => onFinding(stent.id, { nominalMm })}
          />
          <Millimetres
            label="Nominal length, mm"
            value={stent.lengthMm}
            frozen={frozen}
            onValue={(lengthMm) => onFinding(stent.id, { lengthMm })}
          />
          <Choice
            label="Overlaps another stent"
            value={stent.overlap === null ? 'unsaid' : stent.overlap ? 'yes' : 'no'}
            options={OVERLAP}
            disabled={frozen}
            onChange={(value) =>
              onFinding(stent.id, { overlap: value === 'unsaid' ? null : value === 'yes' })
            }
          />
          <TextField
            label="Where it lies"
            value={stent.location}
            disabled={frozen}
            placeholder="from the ostium to the first diagonal…"
            onCommit={(location) => onFinding(stent.id, { location })}
          />
        </fieldset>
      ))}
    </section>
  );
}

interface MillimetresProps {
  readonly label: string;
  readonly value: number | null;
  readonly frozen: boolean;
  readonly onValue: (value: number | null) => void;
}

/** A length; text that is no length leaves what was there. */
function Millimetres({ label, value, frozen, onValue }: MillimetresProps) {
  return (
    <TextField
      label={label}
      value={value === null ? '' : String(value)}
      numeric
      disabled={frozen}
      onCommit={(text) => {
        const parsed = parseMm(text);
        if (parsed !== undefined) onValue(parsed);
      }}
    />
  );
}

function titleOf({ id, segment }: NoteFinding): string {
  const place = segmentOf(segment);
  return place === undefined
    ? `Stent ${id}, no segment yet`
    : `Stent in ${place.number} ${place.abbreviation}`;
}
