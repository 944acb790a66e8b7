import type { Note } from '../../note/schema.js';

/** Every UID of a note that gets another one; some more than once. */
export function uidsOf(note: Note): readonly string[] {
  const { study, pair, conditions, stents, planes } = note;
  return [
    study.studyInstanceUid,
    pair.soft.seriesInstanceUid,
    pair.sharp?.seriesInstanceUid,
    conditions.frameOfReferenceUid,
    ...valuesOf(note).map((value) => value.sopInstanceUid),
    ...stents.flatMap(({ fit }) => fit?.images.map(({ sopInstanceUid }) => sopInstanceUid) ?? []),
    ...planes
      .flatMap(({ source }) => [source.soft, source.sharp])
      .flatMap((source) => [source?.first.sopInstanceUid, source?.last.sopInstanceUid]),
  ].filter((uid) => typeof uid === 'string');
}

/** Every text of a note that may be kept, with the UIDs in it. */
export function sentencesOf(note: Note): readonly string[] {
  const { pair, contrasts, densities, profiles, stents, planes } = note;
  const stacks = [pair.soft, ...(pair.sharp === null ? [] : [pair.sharp])];
  const flags = [
    ...valuesOf(note).flatMap((value) => value.flags),
    ...contrasts.flatMap((contrast) => contrast.flags),
    ...densities.flatMap((density) => density.flags),
    ...stents.flatMap(({ fit }) => fit?.reason ?? []),
  ];
  return [
    ...pair.evidence.flatMap(({ check, text }) => [check, text]),
    ...stacks.flatMap(({ kernelLabel, unit, findings }) => [
      kernelLabel ?? '',
      unit,
      ...findings.map(({ text }) => text),
    ]),
    ...flags.map(({ text }) => text),
    ...contrasts.map(({ formula }) => formula),
    ...profiles.map(({ definition }) => definition),
    ...planes.map(({ resampling }) => resampling),
  ];
}

/** What is measured on one kernel at a time, with its image and its flags. */
function valuesOf({ regions, edges, profiles, repeats }: Note) {
  return [
    ...regions,
    ...edges,
    ...profiles,
    ...repeats.flatMap((repeat) => repeat.regions),
  ].flatMap(({ soft, sharp }) => [soft, sharp].filter((value) => value !== null));
}
