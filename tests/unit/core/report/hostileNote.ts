import type { Note } from '../../../../core/note/index.js';
import { richNote } from '../note/richNote.js';
import { linesNote } from './linesNote.js';

/** A note whose texts try to become a formula, markup, another order of reading, or a line of their own. */
export function hostileNote(): Note {
  const note = richNote();
  const { edges, profiles, stents, planes } = linesNote();
  return {
    ...note,
    synthetic: true,
    study: {
      ...note.study,
      patientId: '@SUM(1+1)*cmd',
      patientName: '<img onerror>^A',
    },
    pair: {
      ...note.pair,
      soft: {
        ...note.pair.soft,
        kernelLabel: '=HYPERLINK("http://x","y")',
        seriesDescription: 'a\u202eb"quoted", and\ttab',
      },
    },
    regions: note.regions.map((region, index) =>
      index === 0
        ? { ...region, place: '+1; =2', quoteReason: '\r=1', label: '-Lumen "1"' }
        : { ...region, place: index === 1 ? '-90' : region.place },
    ),
    edges: edges.map((edge) => ({ ...edge, label: '=1+1' })),
    profiles: profiles.map((profile) => ({
      ...profile,
      label: '@SUM(1)',
      definition: '<script>alert(2)</script>; =2',
    })),
    stents: stents.map((stent) => ({ ...stent, label: '+cmd\u202e' })),
    planes: planes.map((plane) => ({ ...plane, label: '-3', resampling: '</td><img onerror>' })),
    comment: 'first line\nsecond </style><script>alert(1)</script>',
  };
}
