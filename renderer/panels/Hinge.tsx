import { PairedReadout, type PairedReadoutProps } from './PairedReadout.js';
import { TwinRuler, type TwinRulerProps } from './TwinRuler.js';
import { Verdict, type VerdictProps } from './Verdict.js';

export interface HingeProps {
  readonly verdict: VerdictProps;
  /** Undefined until a stack is shown. */
  readonly ruler: TwinRulerProps | undefined;
  readonly readout: PairedReadoutProps;
}

/** The middle column: are the two one, where are we in both, what does the selected region measure in both. */
export function Hinge({ verdict, ruler, readout }: HingeProps) {
  return (
    <section class="hinge" aria-label="Hinge: the pair, the position, the selected region">
      <Verdict {...verdict} />
      {ruler === undefined ? <div class="ruler" /> : <TwinRuler {...ruler} />}
      <PairedReadout {...readout} />
    </section>
  );
}
