/** Why something could not be had: a stable code, a plain sentence, and where it happened. */
export interface Refusal {
  readonly code: string;
  readonly text: string;
  /** DICOM tag in the form (gggg,eeee), where one is to blame. */
  readonly tag?: string;
  /** Byte offset in the file, where one is known. */
  readonly offset?: number;
}

/** Something that was skipped or guessed. It travels with the stack into the note and its exports. */
export interface Finding {
  readonly code: string;
  readonly text: string;
}

/** An expected failure is a value; only our own mistakes are thrown. */
export type Result<T, E = Refusal> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly refusal: E };

export function success<T>(value: T): { readonly ok: true; readonly value: T } {
  return { ok: true, value };
}

export function refuse(
  code: string,
  text: string,
  where: { readonly tag?: string; readonly offset?: number } = {},
): { readonly ok: false; readonly refusal: Refusal } {
  return { ok: false, refusal: { code, text, ...where } };
}
