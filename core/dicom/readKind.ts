import { type Result, refuse, success } from '../result.js';
import type { Attributes } from './attributes.js';
import { canDecode } from './compressed/decodeFrame.js';
import type { DataSet } from './dataSet.js';
import { isNative, SOP_CLASS, sopClassInWords, transferSyntaxInWords } from './uids.js';

/** What kind of CT object a data set is, and how its pixels are encoded. */
export interface ImageKind {
  readonly sopClassUid: string;
  readonly enhanced: boolean;
  readonly transferSyntaxUid: string;
}

/** Accepts CT and enhanced CT images in a transfer syntax that can be decoded; refuses all else by name. */
export function readKind(attributes: Attributes, dataSet: DataSet): Result<ImageKind> {
  const sopClassUid = attributes.text('x00080016') ?? attributes.text('x00020002');
  if (sopClassUid === undefined) return refuse('not-an-image', 'Not an image: no SOP Class.');
  const enhanced = sopClassUid === SOP_CLASS.enhancedCtImage;
  if (!enhanced && sopClassUid !== SOP_CLASS.ctImage) {
    return refuse('not-a-ct-image', `Not a CT image: ${sopClassInWords(sopClassUid)}.`);
  }
  const { transferSyntaxUid } = dataSet;
  if (transferSyntaxUid === undefined) {
    return refuse(
      'no-transfer-syntax',
      'The file does not say how it is encoded: no Transfer Syntax UID.',
    );
  }
  if (!isNative(transferSyntaxUid) && !canDecode(transferSyntaxUid)) {
    return refuse(
      'unsupported-transfer-syntax',
      `An encoding that can't be read: ${transferSyntaxInWords(transferSyntaxUid)}.`,
    );
  }
  return success({ sopClassUid, enhanced, transferSyntaxUid });
}
