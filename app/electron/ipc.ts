import type { z } from 'zod';
import type { Log } from './log.js';
import { ORIGIN } from './origin.js';

/** The parts of a frame that tell who is speaking. */
export interface SenderFrame {
  readonly origin: string;
  /** Null for the top frame. */
  readonly parent: unknown;
}

/** The part of an event that is looked at; both kinds of ipcMain events have it. */
export interface SenderEvent {
  /** Null when the frame has gone or moved on since it sent the message. */
  readonly senderFrame: SenderFrame | null;
}

/** The parts of Electron's ipcMain that are used. */
export interface IpcMainPart {
  handle(
    channel: string,
    listener: (event: SenderEvent, ...sent: unknown[]) => Promise<unknown>,
  ): void;
  on(channel: string, listener: (event: SenderEvent, ...sent: unknown[]) => void): unknown;
}

/**
 * Why a message is refused by its sender, or undefined when it may pass.
 *
 * The origin is compared, not the address: about:blank and blob: addresses don't tell who controls
 * the frame (Electron security guide, item 17).
 */
export function senderRefusal(event: SenderEvent): string | undefined {
  const frame = event.senderFrame;
  if (frame === null) return 'the frame is gone';
  if (frame.parent !== null) return 'not the top frame';
  if (frame.origin !== ORIGIN) return 'foreign origin';
  return undefined;
}

/** A channel that answers: what it takes, what it gives, and what it does. */
export interface Answering<Taken extends unknown[], Given> {
  readonly channel: string;
  readonly takes: z.ZodType<Taken>;
  readonly gives: z.ZodType<Given>;
  readonly answer: (...taken: Taken) => Promise<Given>;
}

/**
 * The one way by which the main process answers the page. Refuses foreign senders and arguments of
 * the wrong form, logs why, and tells the caller no more than that it was refused.
 */
export function handle<Taken extends unknown[], Given>(
  ipcMain: IpcMainPart,
  log: Log,
  { channel, takes, gives, answer }: Answering<Taken, Given>,
): void {
  ipcMain.handle(channel, async (event, ...sent) => {
    const refusal = senderRefusal(event);
    if (refusal !== undefined) {
      log(`refused ${channel}: ${refusal}`);
      throw new Error('request refused');
    }
    const taken = takes.safeParse(sent);
    if (!taken.success) {
      log(`refused ${channel}: ${faults(taken.error)}`);
      throw new Error('request refused');
    }
    return gives.parse(await answer(...taken.data));
  });
}

/** A channel that only hears. */
export interface Hearing<Taken extends unknown[]> {
  readonly channel: string;
  readonly takes: z.ZodType<Taken>;
  readonly hear: (...taken: Taken) => void;
}

/** The same checks for messages without an answer; what is refused is dropped and logged. */
export function listen<Taken extends unknown[]>(
  ipcMain: IpcMainPart,
  log: Log,
  { channel, takes, hear }: Hearing<Taken>,
): void {
  ipcMain.on(channel, (event, ...sent) => {
    const refusal = senderRefusal(event);
    if (refusal !== undefined) {
      log(`refused ${channel}: ${refusal}`);
      return;
    }
    const taken = takes.safeParse(sent);
    if (!taken.success) {
      log(`refused ${channel}: ${faults(taken.error)}`);
      return;
    }
    hear(...taken.data);
  });
}

/** Where the arguments are wrong and how; never their content. */
function faults(error: z.ZodError): string {
  return error.issues
    .map((issue) => `${issue.code} at ${issue.path.map(String).join('.') || 'arguments'}`)
    .join(', ');
}
