import { formatFixed } from '../../core/format/index.js';
import { ASSESSABILITY, type NoteFinding } from '../../core/note/index.js';
import type { LedgerActions } from './ledgerActions.js';
import { groupTitle, type LedgerGroup } from './ledgerGroups.js';
import { Choice, type ChoiceOption } from './parts/Choice.js';
import { parseMm } from './parts/parseMm.js';
import { TextField } from './parts/TextField.js';

export interface LedgerGroupRowProps {
  readonly group: LedgerGroup;
  readonly frozen: boolean;
  readonly onFinding: LedgerActions['onFinding'];
}

type Grade = NonNullable<NoteFinding['assessability']> | 'none';

const GRADES: readonly ChoiceOption<Grade>[] = [
  { value: 'none', text: 'not graded' },
  ...ASSESSABILITY.map((value) => ({ value, text: value })),
];

/** Heading of a finding's regions, with what holds for all of them: nominal size, assessability and its reason. */
export function LedgerGroupRow({ group, frozen, onFinding }: LedgerGroupRowProps) {
  const { finding } = group;
  const [first] = group.regions;
  return (
    <tr class="group">
      <th scope="rowgroup" colSpan={10}>
        <div class="group-line">
          <span class="plain">{groupTitle(finding)}</span>
          {finding !== undefined && first !== undefined && (
            <FindingFields
              finding={finding}
              frozen={frozen}
              onChange={(fields) => onFinding(first.id, fields)}
            />
          )}
        </div>
      </th>
    </tr>
  );
}

interface FieldsProps {
  readonly finding: NoteFinding;
  readonly frozen: boolean;
  readonly onChange: (fields: Partial<Omit<NoteFinding, 'id'>>) => void;
}

function FindingFields({ finding, frozen, onChange }: FieldsProps) {
  if (finding.kind === 'reference') return null;
  const nominal = finding.nominalMm === null ? '' : formatFixed(finding.nominalMm, 2);
  return (
    <>
      {finding.kind === 'stent' && (
        <>
          <Dot />
          <TextField
            bare
            numeric
            look="quiet nominal"
            label={`Nominal diameter of the stent in mm, ${groupTitle(finding)}`}
            placeholder="size?"
            value={nominal}
            disabled={frozen}
            onCommit={(text) => {
              const nominalMm = parseMm(text);
              if (nominalMm !== undefined) onChange({ nominalMm });
            }}
          />
          mm nominal
        </>
      )}
      <Dot />
      <Choice
        bare
        look="quiet"
        label={`Assessability, ${groupTitle(finding)}`}
        value={finding.assessability ?? 'none'}
        options={GRADES}
        disabled={frozen}
        onChange={(grade) => onChange({ assessability: grade === 'none' ? null : grade })}
      />
      {(finding.assessability ?? 'assessable') !== 'assessable' && (
        <TextField
          bare
          look="quiet reason"
          label={`Reason for the assessability, ${groupTitle(finding)}`}
          placeholder="because…"
          value={finding.reason}
          disabled={frozen}
          onCommit={(reason) => onChange({ reason })}
        />
      )}
    </>
  );
}

/** The dot between two parts of a line. */
function Dot() {
  return (
    <span class="dot" aria-hidden="true">
      ·
    </span>
  );
}
