import type { WriteElement } from '../../dicom/write/index.js';
import { framesOfKernel, imageReference, type ReportContext } from './context.js';
import { studyUidOf, uidOf } from './uidOf.js';

/** SOP classes of images by their UIDs, by series, by study. */
type ImagesByStudy = ReadonlyMap<string, ReadonlyMap<string, ReadonlyMap<string, string>>>;

/**
 * Every image that the document refers to, once, under its study and series (PS3.3 C.17.2.3): those of the document's
 * own study in the Current Requested Procedure Evidence Sequence (0040,A375), those of another one, where the reader
 * answered for a pair over two studies, in the Pertinent Other Evidence Sequence (0040,A385). Each absent where empty.
 */
export function evidence(context: ReportContext): readonly WriteElement[] {
  const own = studyUidOf(context.note);
  const studies = [...imagesByStudy(context)];
  return [
    ...evidenceSequence(0x0040a375, new Map(studies.filter(([study]) => study === own))),
    ...evidenceSequence(0x0040a385, new Map(studies.filter(([study]) => study !== own))),
  ];
}

/** True when the sharp series is of another study and nobody can tell which. */
export function otherStudyUnknown({ note, studyOf }: ReportContext): boolean {
  return (
    note.pair.overrides.some(({ check }) => check === 'study') &&
    framesOfKernel(note, 'sharp').some(
      ({ sopInstanceUid }) => studyOf?.(sopInstanceUid) === undefined,
    )
  );
}

function imagesByStudy(context: ReportContext): ImagesByStudy {
  const { note, studyOf } = context;
  const studies = new Map<string, Map<string, Map<string, string>>>();
  for (const kernel of ['soft', 'sharp'] as const) {
    const seriesUid = note.pair[kernel]?.seriesInstanceUid;
    if (seriesUid === undefined) continue;
    for (const { sopInstanceUid, frameNumber } of framesOfKernel(note, kernel)) {
      const found = studyOf?.(sopInstanceUid);
      const series = entry(studies, found === undefined ? studyUidOf(note) : uidOf(found));
      const image = imageReference(context, sopInstanceUid, frameNumber);
      entry(series, uidOf(seriesUid)).set(image.sopInstanceUid, image.sopClassUid);
    }
  }
  return studies;
}

function entry<Value>(map: Map<string, Map<string, Value>>, key: string): Map<string, Value> {
  const present = map.get(key) ?? new Map<string, Value>();
  map.set(key, present);
  return present;
}

function evidenceSequence(tag: number, studies: ImagesByStudy): readonly WriteElement[] {
  if (studies.size === 0) return [];
  const items = [...studies].map(([study, series]): readonly WriteElement[] => [
    { tag: 0x0020000d, vr: 'UI', value: study },
    {
      tag: 0x00081115,
      vr: 'SQ',
      items: [...series].map(([uid, images]): readonly WriteElement[] => [
        { tag: 0x0020000e, vr: 'UI', value: uid },
        {
          tag: 0x00081199,
          vr: 'SQ',
          items: [...images].map(([image, sopClass]): readonly WriteElement[] => [
            { tag: 0x00081150, vr: 'UI', value: sopClass },
            { tag: 0x00081155, vr: 'UI', value: image },
          ]),
        },
      ]),
    },
  ]);
  return [{ tag, vr: 'SQ', items }];
}
