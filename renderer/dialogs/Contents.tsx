import { useState } from 'preact/hooks';
import { CHARACTER_SET_CHOICES } from '../../core/dicom/index.js';
import {
  formatCount,
  formatDicomDate,
  formatFixed,
  formatPersonName,
  NO_VALUE,
  visibleText,
} from '../../core/format/index.js';
import type { FolderIndex, Stack } from '../../core/stack/index.js';
import { Choice } from '../panels/parts/Choice.js';
import { Dialog } from './Dialog.js';
import { leftOutGroups, type StudyContents, studiesOf } from './stackLists.js';

export interface ContentsProps {
  readonly index: FolderIndex;
  readonly folderName: string;
  /** Keys of the stacks that are on the plates. */
  readonly softKey: string | undefined;
  readonly sharpKey: string | undefined;
  /** What the texts are read in; undefined for what the files state. */
  readonly characterSet: string | undefined;
  readonly onCharacterSet: (characterSet: string | undefined) => void;
  readonly onChoosePair: () => void;
  readonly onClose: () => void;
}

/** What the folder holds: stacks by study with what was found about them, and every file left out with its reason. */
export function Contents(props: ContentsProps) {
  const { index } = props;
  const groups = leftOutGroups(index.leftOut);
  return (
    <Dialog
      title={`Contents of ${visibleText(props.folderName)}`}
      size="wide"
      onClose={props.onClose}
      foot={
        <>
          <span class="note">
            {formatCount(index.files)} files read · {formatCount(index.leftOut.length)} left out
          </span>
          <button
            type="button"
            class="button"
            disabled={index.stacks.length === 0}
            onClick={props.onChoosePair}
          >
            Choose pair…
          </button>
          <button type="button" class="button primary" onClick={props.onClose}>
            Close
          </button>
        </>
      }
    >
      <div class="contents">
        {index.stacks.length === 0 && (
          <p>No CT slices were found here. See below why files were left out.</p>
        )}
        {studiesOf(index).map((study) => (
          <StudyTable key={study.stacks[0]?.key} study={study} {...props} />
        ))}
        {index.stacks.length > 0 && <TextsReadAs {...props} />}
        {groups.length > 0 && (
          <section class="left-out">
            <h3>Files left out</h3>
            <ul>
              {groups.map((group) => (
                <li key={`${group.code} ${group.text}`}>
                  <details>
                    <summary>
                      {formatCount(group.files.length)} · {visibleText(group.text)}
                    </summary>
                    <ul class="files">
                      {group.files.map((file) => (
                        <li key={file}>{visibleText(file)}</li>
                      ))}
                    </ul>
                  </details>
                </li>
              ))}
            </ul>
          </section>
        )}
      </div>
    </Dialog>
  );
}

/** Reading texts again in another set, for files that name the wrong one. Nothing is guessed. */
function TextsReadAs({
  characterSet = '',
  onCharacterSet,
}: Pick<ContentsProps, 'characterSet' | 'onCharacterSet'>) {
  const [chosen, setChosen] = useState(characterSet);
  return (
    <section class="texts-read-as">
      <h3>Names that look wrong</h3>
      <p class="dim">
        Files can name another character set than their texts are written in. Choose how to read
        them: the folder is then read again, images and numbers stay as they are, and the findings
        say what you chose.
      </p>
      <Choice
        label="Read names and descriptions as"
        value={chosen}
        options={[
          { value: '', text: 'The files state' },
          ...CHARACTER_SET_CHOICES.map(({ stated, title }) => ({ value: stated, text: title })),
        ]}
        onChange={setChosen}
      />{' '}
      <button
        type="button"
        class="button outlined"
        disabled={chosen === characterSet}
        onClick={() => onCharacterSet(chosen === '' ? undefined : chosen)}
      >
        Read again
      </button>
    </section>
  );
}

interface StudyTableProps {
  readonly study: StudyContents;
  readonly softKey: string | undefined;
  readonly sharpKey: string | undefined;
}

function StudyTable({ study, softKey, sharpKey }: StudyTableProps) {
  const { identity } = study;
  const title = [
    formatPersonName(identity.patientName ?? '') || 'No patient name',
    visibleText(identity.patientId ?? ''),
    visibleText(identity.studyDescription ?? ''),
    formatDicomDate(identity.studyDate ?? ''),
  ].filter((text) => text !== '');
  return (
    <table class="data-table">
      <caption>{title.join(' · ')}</caption>
      <thead>
        <tr>
          <th scope="col" class="number">
            Series
          </th>
          <th scope="col">Description</th>
          <th scope="col">Kernel label</th>
          <th scope="col" class="number">
            Slices
          </th>
          <th scope="col" class="number">
            Spacing mm
          </th>
          <th scope="col" class="number">
            Pixel mm
          </th>
          <th scope="col" class="number">
            Phase %
          </th>
          <th scope="col" class="number">
            kVp
          </th>
          <th scope="col">Unit</th>
          <th scope="col">Findings</th>
        </tr>
      </thead>
      <tbody>
        {study.stacks.map((stack) => (
          <StackRow
            key={stack.key}
            stack={stack}
            plate={stack.key === softKey ? 'soft' : stack.key === sharpKey ? 'sharp' : undefined}
          />
        ))}
      </tbody>
    </table>
  );
}

interface StackRowProps {
  readonly stack: Stack;
  readonly plate: 'soft' | 'sharp' | undefined;
}

function StackRow({ stack, plate }: StackRowProps) {
  const { grid, acquisition } = stack.slices[0].image;
  return (
    <tr>
      <th scope="row" class="number">
        {acquisition.seriesNumber ?? NO_VALUE}
      </th>
      <td>
        {visibleText(acquisition.seriesDescription ?? '')}
        {plate && <span class="dim"> · on the {plate} plate</span>}
      </td>
      <td>{acquisition.kernelLabel ? `“${visibleText(acquisition.kernelLabel)}”` : NO_VALUE}</td>
      <td class="number">{formatCount(stack.slices.length)}</td>
      <td class="number">{formatFixed(stack.sliceSpacingMm, 2)}</td>
      <td class="number">{grid.unscaled ? NO_VALUE : formatFixed(grid.pixelSpacingMm[1], 3)}</td>
      <td class="number">{formatFixed(acquisition.phasePercent, 0)}</td>
      <td class="number">{formatFixed(acquisition.kvp, 0)}</td>
      <td>{visibleText(stack.unit)}</td>
      <td>
        {stack.findings.length === 0 ? (
          <span class="dim">none</span>
        ) : (
          <ul class="findings">
            {stack.findings.map((finding) => (
              <li key={`${finding.code} ${finding.text}`}>{visibleText(finding.text)}</li>
            ))}
          </ul>
        )}
      </td>
    </tr>
  );
}
