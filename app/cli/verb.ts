import type { Result } from '../../core/result.js';
import type { JobOptions } from '../host/services.js';
import type { CliIo } from './io.js';

/** An option of a verb, as the help shows it. */
export interface VerbOption {
  readonly name: string;
  /** Name of its value in the help: 'DIR'. Without one the option is a switch. */
  readonly value?: string;
  readonly required?: true;
  readonly help: string;
}

/** What the user wrote after the verb, checked against what the verb takes. */
export interface VerbArguments {
  /** As many as the verb names. */
  readonly operands: readonly string[];
  readonly values: Readonly<Record<string, string>>;
  readonly switches: ReadonlySet<string>;
}

/** What a verb did: one document for programs, the same as text for people. */
export interface VerbOutcome {
  readonly document: unknown;
  readonly text: string;
  /** 1 when something that the caller asked about does not hold. */
  readonly exitCode: 0 | 1;
}

/** What a verb works with. */
export interface VerbContext extends Pick<CliIo, 'cwd'> {
  /** Says something on standard error. */
  readonly say: (text: string) => void;
  readonly job: JobOptions & Pick<CliIo, 'threads'>;
}

export interface Verb {
  readonly name: string;
  /** Names of what it takes without an option: 'PLAN'. All are required. */
  readonly operands: readonly string[];
  readonly options: readonly VerbOption[];
  readonly summary: string;
  /** More about it, for its own help. */
  readonly details: string;
  readonly run: (given: VerbArguments, context: VerbContext) => Promise<Result<VerbOutcome>>;
}
