import { hash128, stableUid } from '../../stableUid.js';
import { DEMONSTRATION_VERSION, type DemonstrationOptions, type Side } from './acquisition.js';

/** UIDs and file names of a demonstration. All come from what the demonstration is made of. */
export interface Identifiers {
  readonly studyInstanceUid: string;
  readonly frameOfReferenceUid: string;
  readonly irradiationEventUid: string;
  readonly seriesInstanceUid: (side: Side) => string;
  readonly sopInstanceUid: (side: Side, index: number) => string;
  /** Path below the demonstration's folder. The name says nothing of the order of slices. */
  readonly fileOf: (side: Side, index: number) => string;
}

export function identifiersOf({ seed, slices, matrix }: DemonstrationOptions): Identifiers {
  const base = `diptych demonstration ${DEMONSTRATION_VERSION} ${seed} ${slices} ${matrix}`;
  const sopInstanceUid = (side: Side, index: number): string =>
    stableUid(`${base} ${side} ${index}`);
  return {
    studyInstanceUid: stableUid(`${base} study`),
    frameOfReferenceUid: stableUid(`${base} frame of reference`),
    irradiationEventUid: stableUid(`${base} irradiation event`),
    seriesInstanceUid: (side) => stableUid(`${base} ${side}`),
    sopInstanceUid,
    fileOf: (side, index) => {
      const name = hash128(sopInstanceUid(side, index)).toString(16).padStart(32, '0').slice(0, 12);
      return `${side}/${name}.dcm`;
    },
  };
}
