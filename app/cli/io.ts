/** What the command line has of the world: a test gives its own. */
export interface CliIo {
  /** Writes to standard output. */
  readonly out: (text: string) => void;
  /** Writes to standard error. */
  readonly err: (text: string) => void;
  /** Folder against which relative paths are resolved. */
  readonly cwd: string;
  /** Aborted when the user interrupts. */
  readonly signal: AbortSignal;
  /** True when a person watches standard error: then progress is shown there. */
  readonly watched: boolean;
  /** Worker threads that read headers; 0 reads in this thread, without the built worker. By default the library decides. */
  readonly threads?: number;
}
