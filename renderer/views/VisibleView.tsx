import { useState } from 'preact/hooks';
import {
  type Note,
  type RoseCriterion,
  setVisibility,
  type VisibilityChoice,
  visibilityOf,
} from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { parseContrast } from '../plots/parseContrast.js';
import { VisibleControls } from '../plots/VisibleControls.js';
import { VisiblePlot } from '../plots/VisiblePlot.js';
import { visibleReason } from '../plots/visibleReason.js';
import { visibleCaution, visibleMethod, visibleSentence } from '../plots/visibleWords.js';
import { editNote } from '../state/history.js';
import {
  askedVisibility,
  ownPlace,
  pairTexture,
  USUAL_CRITERION,
} from '../state/visibleSelectors.js';
import { useSelected } from './useSelected.js';

/** What could be seen on each kernel at a contrast; the reader's choice of it goes into the note. */
export function VisibleView() {
  const { store, now } = useEngine();
  // Kept here until a contrast is typed: an empty field is no choice yet.
  const [typing, setTyping] = useState(false);
  // Before there is a contrast to ask about, k is no more than how the curves are drawn.
  const [drawnWith, setDrawnWith] = useState<RoseCriterion>(USUAL_CRITERION);
  const note = useSelected((state) => state.note);
  const pair = useSelected((state) => state.pair);
  const assessment = useSelected((state) => state.assessment);
  const selected = useSelected((state) => state.selected);
  const read = { note, assessment, selected };
  const texture = pairTexture(read);
  const reason = visibleReason(pair, assessment, texture);
  if (note === undefined || texture === undefined || reason !== undefined)
    return (
      <div class="plot-area">
        <p class="empty">{reason ?? 'Open a study to see what could be seen in it.'}</p>
      </div>
    );

  const { k: askedK, contrast: asked } = askedVisibility(read);
  const k = asked === undefined ? drawnWith : askedK;
  const contrast = typing && asked !== undefined && 'id' in asked ? undefined : asked;
  const choose = (choice: VisibilityChoice): void => {
    setTyping(false);
    store.change(
      'Choose what could be seen',
      editNote(
        'Choose what could be seen',
        (present) => setVisibility(present, choice, now()),
        'visibility',
      ),
    );
  };
  const onTyped = (text: string): void => {
    const hu = parseContrast(text);
    if (hu !== undefined) {
      choose({ k, contrast: { hu } });
      return;
    }
    setTyping(true);
    if (text === '') return;
    const told = `“${text}” is no contrast. Type a number of HU from 1 to 9999, such as 60.`;
    store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text: told } }));
  };
  const onCriterion = (next: RoseCriterion): void => {
    if (asked === undefined) setDrawnWith(next);
    else choose({ k: next, contrast: asked });
  };
  const result = contrast === undefined ? undefined : visibilityOf(note, texture, { k, contrast });
  const sentences =
    result === undefined
      ? ['Type a contrast, or make one between two regions, to read off the smallest disc.']
      : (['soft', 'sharp'] as const).map((kernel) =>
          visibleSentence({
            kernel,
            texture: texture[kernel],
            contrastHu: result[`${kernel}Hu`] ?? undefined,
            k,
          }),
        );
  const contrastsHu = [result?.softHu, result?.sharpHu].flatMap((hu) => hu ?? []);
  return (
    <div class="visible">
      <VisibleControls
        contrasts={contrastOptions(note)}
        contrastId={contrast !== undefined && 'id' in contrast ? contrast.id : undefined}
        typedHu={contrast !== undefined && 'hu' in contrast ? contrast.hu : undefined}
        k={k}
        disabled={note.verification === 'VERIFIED'}
        onContrast={(id) => choose({ k, contrast: { id } })}
        onTyped={onTyped}
        onCriterion={onCriterion}
      />
      <VisiblePlot texture={texture} k={k} sentences={sentences} own={ownPlace(read)} />
      <p class="visible-words" title={visibleMethod(k)}>
        {sentences.map((sentence) => (
          <span key={sentence}>{sentence} </span>
        ))}
        <span class="note">{visibleCaution(contrastsHu)}</span>
      </p>
    </div>
  );
}

function contrastOptions(note: Note): readonly { readonly id: string; readonly text: string }[] {
  const label = (wanted: string): string =>
    note.regions.find(({ id }) => id === wanted)?.label ?? wanted;
  return note.contrasts.map(({ id, lumen, wall }) => ({
    id,
    text: `${id} · ${label(lumen)} − ${label(wall)}`,
  }));
}
