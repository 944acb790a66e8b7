import type { Identity } from '../../core/dicom/index.js';
import { formatFixed, visibleText } from '../../core/format/index.js';
import type { FolderIndex, LeftOut, Stack } from '../../core/stack/index.js';

/** One study of a folder with its stacks, by series number. */
export interface StudyContents {
  readonly identity: Identity;
  readonly stacks: readonly Stack[];
}

/** Files left out for one reason. */
export interface LeftOutGroup {
  readonly code: string;
  readonly text: string;
  readonly files: readonly string[];
}

/** The stacks by patient and study: two patients with one study identifier are kept apart. */
export function studiesOf(index: Pick<FolderIndex, 'stacks'>): readonly StudyContents[] {
  const studies = new Map<string, Stack[]>();
  for (const stack of index.stacks) {
    const { identity } = stack.slices[0].image;
    const key = `${identity.studyInstanceUid}\n${identity.patientId ?? ''}`;
    studies.set(key, [...(studies.get(key) ?? []), stack]);
  }
  return [...studies.values()].flatMap((stacks) => {
    const [first] = stacks;
    if (first === undefined) return [];
    const number = (stack: Stack) =>
      stack.slices[0].image.acquisition.seriesNumber ?? Number.MAX_SAFE_INTEGER;
    return [
      {
        identity: first.slices[0].image.identity,
        stacks: stacks.toSorted((a, b) => number(a) - number(b)),
      },
    ];
  });
}

/** Files left out by reason, the most frequent first. One code can have several sentences; each is a reason. */
export function leftOutGroups(leftOut: readonly LeftOut[]): readonly LeftOutGroup[] {
  const groups = new Map<string, LeftOut[]>();
  for (const file of leftOut) {
    const key = `${file.code}\n${file.text}`;
    groups.set(key, [...(groups.get(key) ?? []), file]);
  }
  return [...groups.values()]
    .flatMap((files) => {
      const [first] = files;
      if (first === undefined) return [];
      return [{ code: first.code, text: first.text, files: files.map(({ file }) => file) }];
    })
    .toSorted((a, b) => b.files.length - a.files.length);
}

/** How a stack is called in lists: '3 · “Bs-1”', with '#n' where a series was split. */
export function stackName(stack: Stack): string {
  const { seriesNumber, kernelLabel } = stack.slices[0].image.acquisition;
  const part = stack.key.includes('#') ? stack.key.slice(stack.key.lastIndexOf('#')) : '';
  const number = seriesNumber === undefined ? 'Series without number' : `Series ${seriesNumber}`;
  const kernel = kernelLabel === undefined ? 'no kernel label' : `“${visibleText(kernelLabel)}”`;
  return `${number}${part === '' ? '' : ` ${part}`} · ${kernel}`;
}

/** What a list says of a stack beside its name: description, slices, spacing, phase, tube voltage. */
export function stackDetails(stack: Stack): readonly string[] {
  const { grid, acquisition } = stack.slices[0].image;
  const { seriesDescription, phasePercent, kvp, thicknessMm } = acquisition;
  const count = stack.slices.length;
  return [
    seriesDescription === undefined ? '' : visibleText(seriesDescription),
    `${count} ${count === 1 ? 'slice' : 'slices'} of ${grid.columns} × ${grid.rows}`,
    stack.sliceSpacingMm === undefined ? '' : `every ${formatFixed(stack.sliceSpacingMm, 2)} mm`,
    thicknessMm === undefined ? '' : `${formatFixed(thicknessMm, 2)} mm thick`,
    grid.unscaled
      ? 'no pixel spacing: for looking only'
      : `pixels ${formatFixed(grid.pixelSpacingMm[1], 3)} mm`,
    phasePercent === undefined ? 'phase unknown' : `${formatFixed(phasePercent, 0)} % phase`,
    kvp === undefined ? 'kVp unknown' : `${formatFixed(kvp, 0)} kVp`,
  ].filter((text) => text !== '');
}
