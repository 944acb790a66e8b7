import type { Digest } from '../../note/life/index.js';
import { ROLE_NAME } from '../../note/numbering.js';
import { quoteProposal } from '../../note/quoteProposal.js';
import type {
  Evidence,
  Note,
  NoteContrast,
  NoteFinding,
  NoteRegion,
  NoteStack,
} from '../../note/schema.js';
import { cleanEdge } from './cleanEdge.js';
import { type Cleaner, cleanFlag, cleanPlaneReference, cleanUid, safeLabel } from './cleaner.js';
import { cleanPlane } from './cleanPlane.js';
import { cleanProfile } from './cleanProfile.js';
import { cleanStent } from './cleanStent.js';
import { identityFinder, REMOVED } from './cleanText.js';
import { sentencesOf, uidsOf } from './collected.js';
import { identifyingValues } from './identifyingValues.js';
import { CLEAN_CHECKS, METHOD } from './method.js';
import { makePseudonyms, noteIdOf } from './pseudonyms.js';
import { safeNames } from './safeNames.js';

/** How an export without identity is made. */
export interface Deidentification {
  /** Secret of this export, or of a research project: the same salt gives the same new UIDs. At least 16 characters of chance. */
  readonly salt: string;
  readonly digest: Digest;
}

/** A note without identity, and the way back for whoever makes the export. */
export interface DeidentifiedNote {
  readonly note: Note;
  /** The UID that a new one stands for; undefined for one that is not new. For looking images up: it must not be exported. */
  readonly originalUid: (uid: string) => string | undefined;
}

/**
 * A note without identity, for research: PS3.15 Annex E, basic profile, with its structured content kept and cleaned.
 * Each field is named here, so that one that a later version adds is left out until somebody has decided on it; the
 * compiler asks. Copied whole are texture, anatomy, visibility and shapes: numbers and fixed words only. The result is a
 * note like any other, and says in `deidentified` what was done.
 */
export async function deidentifyNote(
  note: Note,
  { salt, digest }: Deidentification,
): Promise<DeidentifiedNote> {
  const { study, pair, conditions } = note;
  const pseudonyms = await makePseudonyms(uidsOf(note), sentencesOf(note), salt, digest);
  const tellsIdentity = identityFinder(identifyingValues(note));
  const cleaner: Cleaner = {
    uid: pseudonyms.uidOf,
    sentence: (text) => (tellsIdentity(text) ? REMOVED : pseudonyms.withUids(text)),
    label: (text) => (text === null || tellsIdentity(text) ? null : pseudonyms.withUids(text)),
    ids: safeNames(note),
  };
  const { uid, ids } = cleaner;
  const clean: Note = {
    format: note.format,
    version: note.version,
    id: await noteIdOf(note.id, salt, digest),
    software: note.software,
    createdAt: '',
    changedAt: '',
    reader: '',
    completion: note.completion,
    verification: 'UNVERIFIED',
    synthetic: note.synthetic,
    study: {
      studyInstanceUid: uid(study.studyInstanceUid),
      patientId: null,
      patientName: null,
      patientBirthDate: null,
      patientSex: null,
      studyDate: null,
      studyDescription: null,
      accessionNumber: null,
    },
    pair: {
      soft: cleanStack(pair.soft, cleaner),
      sharp: pair.sharp === null ? null : cleanStack(pair.sharp, cleaner),
      link: pair.link,
      evidence: pair.evidence.map((one) => cleanEvidence(one, cleaner)),
      overrides: pair.overrides.map(({ check }) => ({ check, reason: REMOVED })),
      texture: pair.texture,
    },
    conditions: {
      kvp: conditions.kvp,
      phasePercent: conditions.phasePercent,
      contrastAgent: null,
      thicknessMm: conditions.thicknessMm,
      frameOfReferenceUid:
        conditions.frameOfReferenceUid === null ? null : uid(conditions.frameOfReferenceUid),
    },
    conditionsByReader: note.conditionsByReader.filter((name) => name !== 'contrastAgent'),
    bandTable: note.bandTable,
    densities: note.densities.map((density) => ({
      ...density,
      regionId: ids.idOf(density.regionId),
      flags: density.flags.map(({ code, text }) => ({ code, text: cleaner.sentence(text) })),
    })),
    anatomy: note.anatomy,
    noise: note.noise,
    findings: note.findings.map((finding) => cleanFinding(finding, cleaner)),
    regions: note.regions.map((region) => cleanRegion(note, region, cleaner)),
    contrasts: note.contrasts.map((contrast) => cleanContrast(contrast, cleaner)),
    edges: note.edges.map((edge) => cleanEdge(edge, cleaner)),
    profiles: note.profiles.map((profile) => cleanProfile(profile, cleaner)),
    stents: note.stents.map((stent) => cleanStent(stent, cleaner)),
    planes: note.planes.map((plane) => cleanPlane(plane, cleaner)),
    repeats: note.repeats.map((repeat) => cleanRepeat(repeat, cleaner)),
    visibility:
      note.visibility === null
        ? null
        : {
            ...note.visibility,
            contrastId:
              note.visibility.contrastId === null ? null : ids.idOf(note.visibility.contrastId),
          },
    comment: '',
    frames: [],
    seal: null,
    amendments: [],
    deidentified: METHOD,
  };
  return { note: clean, originalUid: pseudonyms.originalUid };
}

function cleanStack(stack: NoteStack, { uid, label, sentence }: Cleaner): NoteStack {
  const seriesInstanceUid = uid(stack.seriesInstanceUid);
  return {
    seriesInstanceUid,
    ...(stack.phasePercent === undefined ? {} : { phasePercent: stack.phasePercent }),
    ...(stack.maskedBelowHu === undefined ? {} : { maskedBelowHu: stack.maskedBelowHu }),
    key: `${seriesInstanceUid}${/#\d+$/.exec(stack.key)?.[0] ?? ''}`,
    seriesNumber: stack.seriesNumber,
    seriesDescription: null,
    kernelLabel: label(stack.kernelLabel),
    pixelSpacingMm: stack.pixelSpacingMm,
    sliceSpacingMm: stack.sliceSpacingMm,
    thicknessMm: stack.thicknessMm,
    slices: stack.slices,
    unit: label(stack.unit) ?? 'not told',
    lossy: stack.lossy,
    findings: stack.findings.map(({ code, text }) => ({ code, text: sentence(text) })),
  };
}

function cleanEvidence({ check, state, text }: Evidence, { sentence }: Cleaner): Evidence {
  if (CLEAN_CHECKS.has(check)) return { check, state, text: sentence(text) };
  return { check: sentence(check), state, text: REMOVED };
}

function cleanFinding(finding: NoteFinding, { ids }: Cleaner): NoteFinding {
  return {
    id: ids.idOf(finding.id),
    segment: finding.segment,
    kind: finding.kind,
    nominalMm: finding.nominalMm,
    lengthMm: finding.lengthMm,
    overlap: finding.overlap,
    location: '',
    assessability: finding.assessability,
    reason: '',
  };
}

function cleanRegion(note: Note, region: NoteRegion, cleaner: Cleaner): NoteRegion {
  const id = cleaner.ids.idOf(region.id);
  return {
    id,
    role: region.role,
    shape: region.shape,
    ...cleanPlaneReference(region, cleaner),
    label: safeLabel(ROLE_NAME[region.role], id),
    place: '',
    findingId: region.findingId === null ? null : cleaner.ids.idOf(region.findingId),
    quote: region.quote,
    // A reason of the program is made anew, so that nothing else can stand in its place.
    quoteReason: region.quoteBy === 'proposal' ? quoteProposal(note, region).reason : '',
    quoteBy: region.quoteBy,
    soft: cleanValue(region.soft, cleaner),
    sharp: cleanValue(region.sharp, cleaner),
  };
}

/** What was drawn again stays; who did it and when does not. */
function cleanRepeat(repeat: Note['repeats'][number], cleaner: Cleaner): Note['repeats'][number] {
  const { idOf } = cleaner.ids;
  return {
    id: idOf(repeat.id),
    startedAt: '',
    finishedAt: repeat.finishedAt === null ? null : '',
    reader: '',
    regions: repeat.regions.map(({ regionId, shape, soft, sharp }) => ({
      regionId: idOf(regionId),
      shape,
      soft: cleanValue(soft, cleaner),
      sharp: cleanValue(sharp, cleaner),
    })),
    skipped: repeat.skipped.map(idOf),
  };
}

function cleanValue(value: NoteRegion['soft'], cleaner: Cleaner): NoteRegion['soft'] {
  if (value === null) return null;
  return {
    n: value.n,
    meanHu: value.meanHu,
    sdHu: value.sdHu,
    minHu: value.minHu,
    maxHu: value.maxHu,
    medianHu: value.medianHu,
    areaMm2: value.areaMm2,
    sampledAreaMm2: value.sampledAreaMm2,
    snr: value.snr,
    sliceIndex: value.sliceIndex,
    sliceOffsetMm: value.sliceOffsetMm,
    sopInstanceUid: cleanUid(value.sopInstanceUid, cleaner),
    frameNumber: value.frameNumber,
    standardErrorHu: value.standardErrorHu,
    placementHu: value.placementHu,
    flags: value.flags.map((flag) => cleanFlag(flag, cleaner)),
  };
}

function cleanContrast(contrast: NoteContrast, cleaner: Cleaner): NoteContrast {
  const { idOf } = cleaner.ids;
  return {
    id: idOf(contrast.id),
    lumen: idOf(contrast.lumen),
    wall: idOf(contrast.wall),
    noise: contrast.noise,
    ...(contrast.reference === undefined ? {} : { reference: idOf(contrast.reference) }),
    formula: cleaner.sentence(contrast.formula),
    soft: contrast.soft,
    sharp: contrast.sharp,
    flags: contrast.flags.map((flag) => cleanFlag(flag, cleaner)),
  };
}
