/** The part of the Encoding standard that every host of core/ has: browsers, workers and Node. */
declare class TextDecoder {
  constructor(label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean });
  decode(input?: Uint8Array): string;
}
