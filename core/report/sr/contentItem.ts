import type { WriteElement } from '../../dicom/write/index.js';
import { type Code, codeSequence } from './code.js';
import { srLines, srPersonName } from './srText.js';

/** How an item stands to the one that holds it (PS3.3 table C.17.3-8); those that Comprehensive SR allows here (A.35.3.3.1.2). */
export type Relationship =
  | 'CONTAINS'
  | 'HAS OBS CONTEXT'
  | 'HAS ACQ CONTEXT'
  | 'HAS CONCEPT MOD'
  | 'SELECTED FROM';

/** One item of the content tree as the elements of its data set. */
export type ContentItem = readonly WriteElement[];

/** An image, or one frame of a multi-frame image. */
export interface ImageReference {
  readonly sopClassUid: string;
  readonly sopInstanceUid: string;
  /** From 1. */
  readonly frameNumber: number | null;
}

export const CONCEPT_NAME = 0x0040a043;
export const CONTENT_SEQUENCE = 0x0040a730;

interface ItemHead {
  readonly relationship: Relationship;
  readonly type: 'CODE' | 'CONTAINER' | 'IMAGE' | 'NUM' | 'PNAME' | 'SCOORD' | 'TEXT' | 'UIDREF';
  readonly name?: Code;
}

/** Any item: relationship, value type and name, its own elements, and the items under it. */
export function contentItem(
  { relationship, type, name }: ItemHead,
  own: readonly WriteElement[],
  children: readonly ContentItem[] = [],
): ContentItem {
  return [
    { tag: 0x0040a010, vr: 'CS', value: relationship },
    { tag: 0x0040a040, vr: 'CS', value: type },
    ...(name === undefined ? [] : [codeSequence(CONCEPT_NAME, name)]),
    ...own,
    ...contentSequence(children),
  ];
}

/** The items under an item; left out where there are none. */
export function contentSequence(children: readonly ContentItem[]): readonly WriteElement[] {
  return children.length === 0 ? [] : [{ tag: CONTENT_SEQUENCE, vr: 'SQ', items: children }];
}

export function codeItem(relationship: Relationship, name: Code, value: Code): ContentItem {
  return contentItem({ relationship, type: 'CODE', name }, [codeSequence(0x0040a168, value)]);
}

export function textItem(relationship: Relationship, name: Code, text: string): ContentItem {
  return contentItem({ relationship, type: 'TEXT', name }, [
    { tag: 0x0040a160, vr: 'UT', value: srLines(text) },
  ]);
}

/** A text item, or none where there is nothing to say: a text item needs a value. */
export function textIfAny(
  relationship: Relationship,
  name: Code,
  text: string,
): readonly ContentItem[] {
  return text.trim() === '' ? [] : [textItem(relationship, name, text)];
}

export function uidItem(relationship: Relationship, name: Code, uid: string): ContentItem {
  return contentItem({ relationship, type: 'UIDREF', name }, [
    { tag: 0x0040a124, vr: 'UI', value: uid },
  ]);
}

export function personItem(relationship: Relationship, name: Code, person: string): ContentItem {
  return contentItem({ relationship, type: 'PNAME', name }, [
    { tag: 0x0040a123, vr: 'PN', value: srPersonName(person) },
  ]);
}

/** An image by reference; in an image library it has no name (TID 1601). */
export function imageItem(
  relationship: Relationship,
  name: Code | undefined,
  { sopClassUid, sopInstanceUid, frameNumber }: ImageReference,
): ContentItem {
  const frame: readonly WriteElement[] =
    frameNumber === null ? [] : [{ tag: 0x00081160, vr: 'IS', value: frameNumber }];
  return contentItem({ relationship, type: 'IMAGE', ...(name && { name }) }, [
    {
      tag: 0x00081199,
      vr: 'SQ',
      items: [
        [
          { tag: 0x00081150, vr: 'UI', value: sopClassUid },
          { tag: 0x00081155, vr: 'UI', value: sopInstanceUid },
          ...frame,
        ],
      ],
    },
  ]);
}

/** A container whose items stand apart; `template` is the number of the DCMR template that it follows (PS3.16 annex A). */
export function containerItem(
  name: Code,
  children: readonly ContentItem[],
  template?: string,
): ContentItem {
  return contentItem(
    { relationship: 'CONTAINS', type: 'CONTAINER', name },
    containerElements(template),
    children,
  );
}

/** What a container says of itself. */
export function containerElements(template?: string): readonly WriteElement[] {
  return [
    { tag: 0x0040a050, vr: 'CS', value: 'SEPARATE' },
    ...(template === undefined
      ? []
      : [
          {
            tag: 0x0040a504,
            vr: 'SQ' as const,
            items: [
              [
                { tag: 0x00080105, vr: 'CS' as const, value: 'DCMR' },
                { tag: 0x0040db00, vr: 'CS' as const, value: template },
              ],
            ],
          },
        ]),
  ];
}
