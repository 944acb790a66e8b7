/** How a data set's elements are laid out in bytes. */
export interface Encoding {
  readonly explicitVr: boolean;
  readonly littleEndian: boolean;
}

/** Transfer syntaxes that the writer gives a name (PS3.5 section 10, PS3.6 annex A). */
export const TRANSFER_SYNTAX = {
  implicitLittle: '1.2.840.10008.1.2',
  explicitLittle: '1.2.840.10008.1.2.1',
  deflatedExplicitLittle: '1.2.840.10008.1.2.1.99',
  explicitBig: '1.2.840.10008.1.2.2',
} as const;

/** The layout that a transfer syntax asks for; all but the three named here are explicit little endian (PS3.5 A). */
export function encodingOf(transferSyntaxUid: string): Encoding {
  return {
    explicitVr: transferSyntaxUid !== TRANSFER_SYNTAX.implicitLittle,
    littleEndian: transferSyntaxUid !== TRANSFER_SYNTAX.explicitBig,
  };
}
