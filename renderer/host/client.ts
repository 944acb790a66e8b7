import { hc } from 'hono/client';
import type {
  FolderIndex,
  FolderLevel,
  ListedNote,
  OpenFolder,
  Progress,
  RecentFolder,
  Session,
  Settings,
} from '../../app/host/contract.js';
import type { HostApp } from '../../app/host/handler.js';
import { type Note, parseNote } from '../../core/note/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import { followJob } from './job.js';
import { requestHeaders, send, sendForJson, type Transport } from './transport.js';

/** A note as the host keeps it, and the tag that guards it against another window. */
export interface KeptNote {
  readonly note: Note;
  /** As it stands in its file, with fields that this version does not know: what a seal is checked on. */
  readonly json: unknown;
  readonly etag: string;
}

/** Where one file's bytes are; a worker fetches them itself, so that the page never holds them. */
export interface FrameRequest {
  readonly url: string;
  readonly headers: Readonly<Record<string, string>>;
}

/** Everything the page asks of the host. Each call can be given up by its signal. */
export interface HostClient {
  session(signal: AbortSignal): Promise<Result<Session>>;
  saveSettings(settings: Settings, signal: AbortSignal): Promise<Result<Settings>>;
  /** Opens a folder that the host's own chooser listed, by the id that it gave. */
  openFolder(levelId: string, signal: AbortSignal): Promise<Result<OpenFolder>>;
  /** One level of the chooser; without an id, the level that the host thinks best to begin with. */
  browse(levelId: string | undefined, signal: AbortSignal): Promise<Result<FolderLevel>>;
  openRecent(id: string, signal: AbortSignal): Promise<Result<OpenFolder>>;
  /** Takes one folder off the list of recent ones; gives the list that is left. */
  forgetOne(id: string, signal: AbortSignal): Promise<Result<readonly RecentFolder[]>>;
  /** Forgets all recent folders; gives the list that is left. */
  forgetRecent(signal: AbortSignal): Promise<Result<readonly RecentFolder[]>>;
  /** With a character set, all texts are read in it whatever the files state. */
  index(
    grant: string,
    onProgress: (progress: Progress) => void,
    signal: AbortSignal,
    characterSet?: string,
  ): Promise<Result<FolderIndex>>;
  /** With a frame (from 0) of a multi-frame file, only that frame's encoded bytes. */
  frame(grant: string, fileId: number, frame?: number): FrameRequest;
  demonstration(
    onProgress: (progress: Progress) => void,
    signal: AbortSignal,
  ): Promise<Result<OpenFolder>>;
  /** Undefined when this reader has no note of the study yet. */
  readNote(studyInstanceUid: string, signal: AbortSignal): Promise<Result<KeptNote | undefined>>;
  /**
   * Keeps a note. `etag` is the tag of the version that it was made from, undefined for a new note; when
   * the host holds another version the refusal's code is 'conflict' and nothing is written.
   */
  writeNote(
    studyInstanceUid: string,
    note: Note,
    etag: string | undefined,
    signal: AbortSignal,
  ): Promise<Result<string>>;
  /** The notes of a study that lie on this machine, without their content. */
  listNotes(studyInstanceUid: string, signal: AbortSignal): Promise<Result<readonly ListedNote[]>>;
  /** Another reader's note of a study. */
  readNoteOf(
    studyInstanceUid: string,
    reader: string,
    signal: AbortSignal,
  ): Promise<Result<KeptNote | undefined>>;
  /** The note as a PDF file, with its key images as PNG files in base64. */
  writePdf(
    note: Note,
    pictures: readonly { readonly regionId: string; readonly png: string }[],
    signal: AbortSignal,
  ): Promise<Result<Uint8Array<ArrayBuffer>>>;
  /** Holds a stream open for as long as the page lives; ends when the host is gone. */
  presence(signal: AbortSignal): Promise<Result<undefined>>;
}

/** A part of an address. The typed client puts parts in as they are, and some of them come from files. */
const encoded = encodeURIComponent;

/** @param origin where the host answers: the page's own origin. */
export function createClient(origin: string, transport: Transport): HostClient {
  const { api } = hc<HostApp>(origin);
  const folder = api.folders[':grant'];
  const noteUrl = (studyInstanceUid: string): URL =>
    api.notes[':studyInstanceUid'].$url({ param: { studyInstanceUid: encoded(studyInstanceUid) } });
  // The typed client takes a last part named 'index' for the folder itself, so this one address is put together here.
  const indexUrl = (grant: string): URL => new URL(`/api/folders/${encoded(grant)}/index`, origin);
  const readNote = async (url: URL, signal: AbortSignal): Promise<Result<KeptNote | undefined>> => {
    const answer = await send(transport, { method: 'GET', url, signal });
    if (answer.ok) return keptNote(answer.value);
    return answer.refusal.code === 'no-note' ? success(undefined) : answer;
  };
  return {
    session: (signal) => sendForJson(transport, { method: 'GET', url: api.session.$url(), signal }),
    saveSettings: (settings, signal) =>
      sendForJson(transport, { method: 'PUT', url: api.settings.$url(), body: settings, signal }),
    openFolder: (id, signal) =>
      sendForJson(transport, { method: 'POST', url: api.folders.$url(), body: { id }, signal }),
    browse: (id, signal) => {
      const url = api.browse.$url();
      if (id !== undefined) url.searchParams.set('at', id);
      return sendForJson(transport, { method: 'GET', url, signal });
    },
    openRecent: (id, signal) =>
      sendForJson(transport, {
        method: 'POST',
        url: api.recent[':id'].open.$url({ param: { id: encoded(id) } }),
        signal,
      }),
    forgetOne: (id, signal) =>
      sendForJson(transport, {
        method: 'DELETE',
        url: api.recent[':id'].$url({ param: { id: encoded(id) } }),
        signal,
      }),
    forgetRecent: (signal) =>
      sendForJson(transport, { method: 'DELETE', url: api.recent.$url(), signal }),
    index: (grant, onProgress, signal, characterSet) => {
      const url = indexUrl(grant);
      if (characterSet !== undefined) url.searchParams.set('characterSet', characterSet);
      return followJob(transport, { method: 'GET', url, signal }, onProgress);
    },
    frame: (grant, fileId, frame) => {
      const url = folder.frames[':fileId'].$url({
        param: { grant: encoded(grant), fileId: String(fileId) },
      });
      if (frame !== undefined) url.searchParams.set('frame', String(frame));
      return { url: url.href, headers: requestHeaders(transport) };
    },
    demonstration: (onProgress, signal) =>
      followJob(transport, { method: 'POST', url: api.demonstration.$url(), signal }, onProgress),
    readNote: (study, signal) => readNote(noteUrl(study), signal),
    listNotes: (study, signal) =>
      sendForJson(transport, {
        method: 'GET',
        url: api.notes[':studyInstanceUid'].readers.$url({
          param: { studyInstanceUid: encoded(study) },
        }),
        signal,
      }),
    readNoteOf: (study, reader, signal) => {
      const url = noteUrl(study);
      url.searchParams.set('reader', reader);
      return readNote(url, signal);
    },
    writeNote: async (study, note, etag, signal) => {
      const answer = await send(transport, {
        method: 'PUT',
        url: noteUrl(study),
        body: note,
        headers: etag === undefined ? { 'If-None-Match': '*' } : { 'If-Match': etag },
        signal,
      });
      if (!answer.ok) return answer;
      const tag = answer.value.headers.get('ETag');
      return tag === null
        ? refuse('no-etag', 'The note was saved, but without a tag; open it again before going on.')
        : success(tag);
    },
    writePdf: async (note, pictures, signal) => {
      const url = api.exports.pdf.$url();
      const answer = await send(transport, {
        method: 'POST',
        url,
        body: { note, pictures },
        signal,
      });
      return answer.ok ? success(new Uint8Array(await answer.value.arrayBuffer())) : answer;
    },
    presence: async (signal) => {
      const request = { method: 'GET', url: api.presence.$url(), signal } as const;
      const answer = await followJob<undefined>(transport, request, () => {});
      return answer.ok ? success(undefined) : answer;
    },
  };
}

async function keptNote(response: Response): Promise<Result<KeptNote>> {
  const json: unknown = await response.json();
  const note = parseNote(json);
  if (!note.ok) return note;
  const etag = response.headers.get('ETag');
  return etag === null
    ? refuse('no-etag', 'The saved note came without a tag, so it can’t be changed safely.')
    : success({ note: note.value, json, etag });
}
