import { formatQuantity } from '../../format/index.js';
import type { Amendment, Note } from '../schema.js';
import { NoteSchema } from '../schema.js';
import { canonicalJson } from './canonicalJson.js';

/**
 * What a note says otherwise than an earlier state of it, a sentence each: what was measured and found and then added,
 * removed or changed, and the comment. Empty where nothing that is reported differs.
 */
export function amendmentText({ before }: Amendment, later: Note): readonly string[] {
  const parsed = NoteSchema.safeParse({ ...before, amendments: [] });
  if (!parsed.success) return ['The earlier state is of another version and is kept as it was.'];
  const earlier = parsed.data;
  return [
    ...compare(earlier.regions, later.regions, regionWords),
    ...compare(earlier.contrasts, later.contrasts, contrastWords),
    ...compare(earlier.edges, later.edges, edgeWords),
    ...compare(earlier.profiles, later.profiles, profileWords),
    ...compare(earlier.stents, later.stents, stentWords),
    ...compare(earlier.planes, later.planes, planeWords),
    ...compare(earlier.findings, later.findings, findingWords),
    ...(earlier.comment === later.comment ? [] : ['The comment was changed.']),
    ...(earlier.completion === later.completion
      ? []
      : [`Completion was ${earlier.completion.toLowerCase()}.`]),
  ];
}

function compare<Item extends { readonly id: string }>(
  earlier: readonly Item[],
  later: readonly Item[],
  words: (item: Item) => string,
): readonly string[] {
  const before = new Map(earlier.map((item) => [item.id, item]));
  const after = new Map(later.map((item) => [item.id, item]));
  return [
    ...later.flatMap((item) => {
      const old = before.get(item.id);
      if (old === undefined) return [`Added: ${words(item)}.`];
      if (canonicalJson(old) === canonicalJson(item)) return [];
      const [was, is] = [words(old), words(item)];
      return [was === is ? `Changed: ${is}.` : `Changed: ${is}; it was ${was}.`];
    }),
    ...earlier.filter(({ id }) => !after.has(id)).map((item) => `Removed: ${words(item)}.`),
  ];
}

const hu = (value: number | null | undefined): string => formatQuantity(value ?? null, 'hu');

function regionWords(region: Note['regions'][number]): string {
  return `${region.label}, soft ${hu(region.soft?.meanHu)} HU, sharp ${hu(region.sharp?.meanHu)} HU`;
}

function contrastWords(contrast: Note['contrasts'][number]): string {
  const ratio = (value: number | null): string => formatQuantity(value, 'ratio');
  return `contrast ${contrast.id}, soft ${ratio(contrast.soft)}, sharp ${ratio(contrast.sharp)}`;
}

const mm = (value: number | null | undefined): string => formatQuantity(value ?? null, 'lengthMm');

function edgeWords({ label, soft, sharp }: Note['edges'][number]): string {
  return `${label}, rise soft ${mm(soft?.riseMm)} mm, sharp ${mm(sharp?.riseMm)} mm`;
}

function profileWords({ label, soft, sharp }: Note['profiles'][number]): string {
  return `${label}, visible width soft ${mm(soft?.visibleWidthMm)} mm, sharp ${mm(sharp?.visibleWidthMm)} mm`;
}

function stentWords({ label, fit }: Note['stents'][number]): string {
  const lumen = formatQuantity(fit?.lumenHu?.value ?? null, 'fittedHu');
  return `${label}, fitted strut diameter ${mm(fit?.strutDiameterMm?.value)} mm, lumen ${lumen} HU`;
}

function planeWords({ label, resampling }: Note['planes'][number]): string {
  return `${label}, resampled by ${resampling}`;
}

function findingWords({ kind, segment, assessability }: Note['findings'][number]): string {
  const place = segment === null ? '' : ` in segment ${segment}`;
  return `${kind}${place}, ${assessability ?? 'not said whether assessable'}`;
}
