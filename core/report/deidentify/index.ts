export {
  type Deidentification,
  type DeidentifiedNote,
  deidentifyNote,
} from './deidentifyNote.js';
