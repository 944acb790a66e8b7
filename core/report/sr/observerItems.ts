import { IMPLEMENTATION_CLASS_UID } from '../../dicom/write/index.js';
import { dcm } from './code.js';
import { type ContentItem, codeItem, personItem, textItem, uidItem } from './contentItem.js';
import type { ReportContext } from './context.js';

const TYPE = dcm('121005', 'Observer Type');

/** Who observed (TID 1001): the reader, where the note names one, and the program. */
export function observerItems({ note }: Pick<ReportContext, 'note'>): readonly ContentItem[] {
  const { reader, software } = note;
  const context = 'HAS OBS CONTEXT';
  return [
    ...(reader.trim() === ''
      ? []
      : [
          codeItem(context, TYPE, dcm('121006', 'Person')),
          personItem(context, dcm('121008', 'Person Observer Name'), reader),
        ]),
    codeItem(context, TYPE, dcm('121007', 'Device')),
    uidItem(context, dcm('121012', 'Device Observer UID'), IMPLEMENTATION_CLASS_UID),
    textItem(
      context,
      dcm('121013', 'Device Observer Name'),
      `${software.name} ${software.version}`,
    ),
  ];
}
