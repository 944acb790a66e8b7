import { z } from 'zod';

/** Largest export that the page may hand over, in bytes: far above any table, below what hurts. */
export const LARGEST_SAVE_BYTES = 256 * 1024 * 1024;

const commandIds = z.array(z.string().max(64)).max(256).readonly();

/** What the page reports of itself; the form of ShellState in the host's contract. */
export const shellStateMessage = z.strictObject({
  enabled: commandIds,
  checked: commandIds,
  unsaved: z.boolean(),
  title: z.string().max(300),
});

/** Arguments of a message without any. */
export const noArguments = z.tuple([]);

/** The one path that ever comes from the preload script: of a file or folder that was dropped. */
export const droppedArguments = z.tuple([z.string().min(1).max(32_767)]);

/** A proposed file name and the bytes. */
export const saveArguments = z.tuple([
  z.string().min(1).max(255),
  z
    .instanceof(Uint8Array)
    .refine((bytes) => bytes.byteLength <= LARGEST_SAVE_BYTES, 'too large to save'),
]);

/** Arguments of the page's report. */
export const stateArguments = z.tuple([shellStateMessage]);

/** What opening answers: a folder by its grant, or nothing. */
export const openFolderAnswer = z
  .strictObject({ grant: z.string().min(1), name: z.string() })
  .readonly()
  .optional();

/** What saving answers. */
export const savedAnswer = z.boolean();
