/** Where the shell says what it refused and why. Lines hold no path and no text from files. */
export type Log = (line: string) => void;

/** Writes to standard error, so that standard output stays free. */
export const logToStandardError: Log = (line) => {
  process.stderr.write(`diptych: ${line}\n`);
};
