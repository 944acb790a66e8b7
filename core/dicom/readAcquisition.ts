import type { Attributes } from './attributes.js';
import type { Acquisition, Identity } from './ctImage.js';

/** Drops the keys whose value is absent, so that absence stays absence. */
function present<T extends object>(value: { [K in keyof T]: T[K] | undefined }): Partial<T> {
  const kept: Partial<T> = {};
  for (const key in value) if (value[key] !== undefined) kept[key] = value[key];
  return kept;
}

/** Patient and study attributes, as the file has them. */
export function readIdentity(attributes: Attributes, studyInstanceUid: string): Identity {
  return {
    studyInstanceUid,
    ...present<Omit<Identity, 'studyInstanceUid'>>({
      patientId: attributes.text('x00100020'),
      patientName: attributes.text('x00100010'),
      patientBirthDate: attributes.text('x00100030'),
      patientSex: attributes.text('x00100040'),
      studyDate: attributes.text('x00080020'),
      studyTime: attributes.text('x00080030'),
      studyDescription: attributes.text('x00081030'),
      accessionNumber: attributes.text('x00080050'),
    }),
  };
}

/**
 * Series and acquisition attributes, as the file has them; of a frame its own ones (PS3.3 C.7.6.16.2.2, C.7.6.18).
 * Percent phase is never computed from a trigger time.
 */
export function readAcquisition(attributes: Attributes, seriesInstanceUid: string): Acquisition {
  const frame = momentOf(attributes.text('x00189074'));
  const whole = momentOf(attributes.text('x0008002a'));
  return {
    seriesInstanceUid,
    lossy: attributes.text('x00282110') === '01',
    ...present<Omit<Acquisition, 'seriesInstanceUid' | 'lossy'>>({
      seriesNumber: attributes.integer('x00200011'),
      seriesDescription: attributes.text('x0008103e'),
      seriesDate: attributes.text('x00080021'),
      seriesTime: attributes.text('x00080031'),
      frameOfReferenceUid: attributes.text('x00200052'),
      kernelLabel: attributes.text('x00181210'),
      acquisitionNumber: attributes.unsignedShort('x00209156') ?? attributes.integer('x00200012'),
      acquisitionUid: attributes.text('x00080017'),
      acquisitionDate: frame?.date ?? attributes.text('x00080022') ?? whole?.date,
      acquisitionTime: frame?.time ?? attributes.text('x00080032') ?? whole?.time,
      phasePercent: finite(attributes.float('x00209241')),
      triggerTimeMs: attributes.decimal('x00181060') ?? finite(attributes.double('x00209153')),
      nominalIntervalMs: attributes.decimal('x00181062') ?? finite(attributes.double('x00209251')),
      temporalPosition: attributes.integer('x00200100') ?? attributes.unsignedLong('x00209128'),
      kvp: attributes.decimal('x00180060'),
      thicknessMm: attributes.decimal('x00180050'),
      contrastAgent: attributes.text('x00180010'),
      manufacturer: attributes.text('x00080070'),
      model: attributes.text('x00081090'),
      softwareVersions: attributes.text('x00181020'),
      reconstructionDiameterMm: attributes.decimal('x00181100'),
    }),
  };
}

/** A DT value (PS3.5 6.2) as date and time; undefined when it is too short for both. */
function momentOf(text: string | undefined): { date: string; time: string } | undefined {
  const match = /^(\d{8})(\d{2,6}(?:\.\d+)?)/.exec(text ?? '');
  const [, date, time] = match ?? [];
  return date === undefined || time === undefined ? undefined : { date, time };
}

function finite(value: number | undefined): number | undefined {
  return value !== undefined && Number.isFinite(value) ? value : undefined;
}
