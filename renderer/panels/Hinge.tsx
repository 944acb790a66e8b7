import type { ComponentChildren } from 'preact';
import { PairedReadout, type PairedReadoutProps } from './PairedReadout.js';
import { TwinRuler, type TwinRulerProps } from './TwinRuler.js';
import { Verdict, type VerdictProps } from './Verdict.js';

export interface HingeProps {
  readonly verdict: VerdictProps;
  /** Undefined until a stack is shown. */
  readonly ruler: TwinRulerProps | undefined;
  readonly readout: PairedReadoutProps;
  /** Slices and oblique cuts to choose from. */
  readonly planes?: ComponentChildren;
  /** The selected stent or profile, in place of the region's readout. */
  readonly across?: ComponentChildren;
}

/** The middle column: are the two one, where are we in both, what does the selected region measure in both. */
export function Hinge({ verdict, ruler, readout, planes, across }: HingeProps) {
  return (
    <section
      class={ruler === undefined && planes !== undefined ? 'hinge without-ruler' : 'hinge'}
      aria-label="Hinge: the pair, the position, the selected region"
    >
      <Verdict {...verdict} />
      <div class="hinge-planes">{planes}</div>
      {ruler === undefined ? <div class="ruler" /> : <TwinRuler {...ruler} />}
      {across ?? <PairedReadout {...readout} />}
    </section>
  );
}
