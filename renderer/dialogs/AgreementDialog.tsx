import { type Agreement, agreement } from '../../core/agreement/index.js';
import { formatFixed } from '../../core/format/index.js';
import {
  COMPARED,
  type Compared,
  type Kernel,
  pairedValues,
  type ReadingPair,
} from '../../core/note/index.js';
import { Choice, type ChoiceOption } from '../panels/parts/Choice.js';
import { AgreementPlot } from '../plots/AgreementPlot.js';
import { Dialog } from './Dialog.js';

export interface AgreementDialogProps {
  /** What can be compared with the first reading: repeats of this note, other readers' notes. */
  readonly comparisons: readonly ChoiceOption<string>[];
  readonly chosen: string;
  /** Undefined while nothing is chosen or the other note is read. */
  readonly readings: ReadingPair | undefined;
  readonly kernel: Kernel;
  readonly compared: Compared;
  readonly problem: string | undefined;
  readonly onChoose: (id: string) => void;
  readonly onKernel: (kernel: Kernel) => void;
  readonly onCompared: (compared: Compared) => void;
  readonly onFile: (file: File) => void;
  readonly onClose: () => void;
}

const KERNELS: readonly ChoiceOption<Kernel>[] = [
  { value: 'soft', text: 'soft kernel' },
  { value: 'sharp', text: 'sharp kernel' },
];
const QUANTITIES = (Object.keys(COMPARED) as Compared[]).map((value) => ({
  value,
  text: COMPARED[value].name,
}));

/** How well two readings agree: of one reader twice, or of two readers. */
export function AgreementDialog(props: AgreementDialogProps) {
  const { readings, kernel, compared } = props;
  return (
    <Dialog
      title="Agreement of readings"
      size="wide"
      onClose={props.onClose}
      foot={
        <>
          <span class="note" role="status">
            {props.problem ?? ''}
          </span>
          <button type="button" class="button primary" onClick={props.onClose}>
            Close
          </button>
        </>
      }
    >
      <div class="agreement-choices">
        <Choice
          label="First reading against"
          value={props.chosen}
          options={props.comparisons}
          onChange={props.onChoose}
        />
        <Choice label="On the" value={kernel} options={KERNELS} onChange={props.onKernel} />
        <Choice label="Number" value={compared} options={QUANTITIES} onChange={props.onCompared} />
        <label class="labelled">
          <span>A colleague’s note file</span>
          <input
            type="file"
            accept=".json,application/json"
            onChange={(event) => {
              const file = event.currentTarget.files?.[0];
              if (file !== undefined) props.onFile(file);
            }}
          />
        </label>
      </div>
      {readings === undefined ? (
        <p class="hint">
          Read the regions again, blind (Note menu), or choose another reader’s note of this study.
        </p>
      ) : (
        <Result readings={readings} kernel={kernel} compared={compared} />
      )}
    </Dialog>
  );
}

interface ResultProps {
  readonly readings: ReadingPair;
  readonly kernel: Kernel;
  readonly compared: Compared;
}

function Result({ readings, kernel, compared }: ResultProps) {
  const { labels, first, second } = pairedValues(readings, kernel, compared);
  const found = agreement(first, second);
  const { name, unit } = COMPARED[compared];
  const quantity = unit === '' ? name : `${name}, ${unit}`;
  return (
    <>
      <p>
        {readings.firstName} − {readings.secondName}: {quantity}, {kernel} kernel
      </p>
      {'reason' in found ? (
        <p>{found.reason}</p>
      ) : (
        <div class="agreement-result">
          <AgreementTable agreement={found} unit={unit} />
          <AgreementPlot
            agreement={found}
            quantity={quantity}
            description={`Bland–Altman plot of ${found.n} regions, ${quantity}: bias ${formatFixed(found.limits.bias.value, 1)}, limits of agreement ${formatFixed(found.limits.lower.value, 1)} to ${formatFixed(found.limits.upper.value, 1)}.`}
          />
        </div>
      )}
      <details>
        <summary>Regions</summary>
        <table class="data-table">
          <thead>
            <tr>
              <th scope="col">Region</th>
              <th scope="col" class="number">
                {readings.firstName}
              </th>
              <th scope="col" class="number">
                {readings.secondName}
              </th>
              <th scope="col" class="number">
                Difference
              </th>
            </tr>
          </thead>
          <tbody>
            {labels.map((label, index) => (
              <tr key={label}>
                <th scope="row">{label}</th>
                <td class="number">{formatFixed(first[index], 1)}</td>
                <td class="number">{formatFixed(second[index], 1)}</td>
                <td class="number">{formatFixed((first[index] ?? 0) - (second[index] ?? 0), 1)}</td>
              </tr>
            ))}
          </tbody>
        </table>
        {readings.unmatched.map((text) => (
          <p key={text} class="hint">
            {text}
          </p>
        ))}
      </details>
    </>
  );
}

function AgreementTable({
  agreement: { n, limits, repeatability, intraclass, caution },
  unit,
}: {
  readonly agreement: Agreement;
  readonly unit: string;
}) {
  const interval = (
    { low, high }: { readonly low: number; readonly high: number },
    digits: number,
  ) => `${formatFixed(low, digits)} to ${formatFixed(high, digits)}`;
  const rows: readonly (readonly [string, string, string])[] = [
    ['Regions', `${n}`, ''],
    ['Bias', formatFixed(limits.bias.value, 1), interval(limits.bias, 1)],
    ['SD of the differences', formatFixed(limits.sd, 1), ''],
    ['Lower limit of agreement', formatFixed(limits.lower.value, 1), interval(limits.lower, 1)],
    ['Upper limit of agreement', formatFixed(limits.upper.value, 1), interval(limits.upper, 1)],
    ['Within-region SD', formatFixed(repeatability.withinSd, 1), ''],
    ['Coefficient of repeatability', formatFixed(repeatability.coefficient, 1), ''],
    ...(intraclass === undefined
      ? []
      : ([
          [
            'ICC(2,1), absolute agreement',
            formatFixed(intraclass.twoWayAgreement.value, 2),
            interval(intraclass.twoWayAgreement, 2),
          ],
          [
            'ICC(3,1), consistency',
            formatFixed(intraclass.twoWayConsistency.value, 2),
            interval(intraclass.twoWayConsistency, 2),
          ],
        ] as const)),
  ];
  return (
    <div>
      <table class="data-table">
        <thead>
          <tr>
            <th scope="col">{unit === '' ? 'Agreement' : `Agreement, ${unit}`}</th>
            <th scope="col" class="number">
              Value
            </th>
            <th scope="col" class="number">
              95 % interval
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(([name, value, range]) => (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td class="number">{value}</td>
              <td class="number">{range}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {caution !== undefined && <p class="hint">{caution}</p>}
      <p class="source">
        Bland and Altman 1986, Lancet i:307; Shrout and Fleiss 1979, Psychol Bull 86:420.
      </p>
    </div>
  );
}
