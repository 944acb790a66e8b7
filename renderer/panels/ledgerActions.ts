import type {
  ContrastParts,
  FindingFields,
  NoiseSource,
  NoteRegion,
} from '../../core/note/index.js';
import type { Role } from '../../core/region/index.js';

/** What can be changed in the ledger. The engine turns each into a named change of the note. */
export interface LedgerActions {
  readonly onSelect: (regionId: string) => void;
  readonly onDelete: (regionId: string) => void;
  readonly onRole: (regionId: string, role: Role) => void;
  readonly onPlace: (regionId: string, place: string) => void;
  readonly onQuote: (regionId: string, quote: NoteRegion['quote'], reason: string) => void;
  /** Takes the reader's choice of a kernel back: the proposal is in force. */
  readonly onProposedQuote: (regionId: string) => void;
  /** Segment and kind move this region; size, assessability and reason hold for its whole finding. */
  readonly onFinding: (regionId: string, fields: FindingFields) => void;
  readonly onClearFinding: (regionId: string) => void;
  /** Goes to the stent that was fitted where a region lies, or has one fitted there. */
  readonly onFittedStent: (regionId: string) => void;
  readonly onNoise: (noise: NoiseSource) => void;
  readonly onNewContrast: () => void;
  readonly onContrast: (contrastId: string, change: Partial<ContrastParts>) => void;
  readonly onDeleteContrast: (contrastId: string) => void;
}
