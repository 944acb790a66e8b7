import { formatQuantity } from '../../core/format/index.js';
import { edgeQuote, type NoteEdge } from '../../core/note/index.js';
import { QuoteFields, type QuoteFieldsProps } from './parts/QuoteFields.js';

export interface EdgeInspectorProps extends Pick<QuoteFieldsProps, 'onQuote' | 'onProposed'> {
  readonly edge: NoteEdge;
  readonly frozen: boolean;
}

/** The line under the ledger for the selected edge line: its rise on both kernels, and which of them is quoted. */
export function EdgeInspector({ edge, frozen, onQuote, onProposed }: EdgeInspectorProps) {
  const rise = (kernel: 'soft' | 'sharp') => {
    const value = edge[kernel];
    const reason = value === null ? 'Not measured on this kernel.' : value.flags[0]?.text;
    return (
      <span title={value?.riseMm == null ? reason : '10–90 % distance of the edge'}>
        {kernel} {formatQuantity(value?.riseMm, 'lengthMm')} mm
      </span>
    );
  };
  return (
    <div class="inspector">
      <span class="name">{edge.label}</span>
      <span>Edge rise</span>
      {rise('soft')}
      {rise('sharp')}
      <QuoteFields
        quoted={edge}
        label={edge.label}
        proposal={edgeQuote(edge)}
        frozen={frozen}
        onQuote={onQuote}
        onProposed={onProposed}
      />
    </div>
  );
}
