import { Dialog } from './Dialog.js';
import { CAUTIONS } from './help/cautions.js';

export interface CautionsProps {
  /** False at the first start: then they must be accepted before anything else. */
  readonly accepted: boolean;
  readonly onAccept: () => void;
  readonly onClose: () => void;
}

/** What must be known before a number is used. */
export function Cautions({ accepted, onAccept, onClose }: CautionsProps) {
  return (
    <Dialog
      title="Before you measure"
      size="page"
      {...(accepted ? { onClose } : {})}
      foot={
        accepted ? (
          <button type="button" class="button primary" onClick={onClose}>
            Close
          </button>
        ) : (
          <>
            <span class="note">You can read this again under Help.</span>
            <button type="button" class="button primary" onClick={onAccept}>
              I have read this and accept it
            </button>
          </>
        )
      }
    >
      <div class="prose cautions">
        {CAUTIONS.map((section) => (
          <section key={section.title}>
            <h3>{section.title}</h3>
            <ul>
              {section.sentences.map((sentence) => (
                <li key={sentence}>{sentence}</li>
              ))}
            </ul>
          </section>
        ))}
      </div>
    </Dialog>
  );
}
