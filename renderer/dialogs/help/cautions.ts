/** A heading and its sentences. */
export interface HelpSection {
  readonly title: string;
  readonly sentences: readonly string[];
}

/** What must be known before a number of the bench is used. Shown at the first start and in the help. */
export const CAUTIONS: readonly HelpSection[] = [
  {
    title: 'What Diptych is',
    sentences: [
      'An investigational aid for measuring. It is not a medical device, and it is not for primary diagnosis, for choosing a treatment or for emergencies.',
      'A licensed physician checks every number against the source images and owns the report. Where the local protocol says otherwise, the protocol decides.',
    ],
  },
  {
    title: 'What its numbers depend on',
    sentences: [
      'HU, noise and visible width change with the scanner, the kernel, the tube voltage, the contrast agent, the patient’s size and the cardiac phase. Compare two dates only on the same kernel, tube voltage and software version.',
      'A threshold from the literature holds for the tube voltage and the kernel that it was published for. Diptych does not convert between them.',
      'The soft kernel is for mean density, the sharp kernel for edges, struts and widths. Edge enhancement and undershoot shift HU on the sharp kernel, and blooming narrows the lumen on both.',
      'A low density inside a stent is no proof of restenosis: struts, beam hardening, motion and noise make it too.',
    ],
  },
  {
    title: 'What to check each time',
    sentences: [
      'That the patient and both series are the right ones, and that the hinge calls them one acquisition. Where it has reservations, read its evidence before you measure.',
      'That anatomy lies at the same place on both plates. Breathing and motion between reconstructions of different phases can’t be seen in the headers.',
      'That a region stays clear of edges, struts and calcium, and holds enough pixels. Flags stand beside a number for this; do not quote a flagged number without its flag.',
      'That decimals are not taken for accuracy: look at the SD, the number of pixels and the standard error.',
    ],
  },
  {
    title: 'What leaves this machine',
    sentences: [
      'Diptych sends nothing anywhere. Notes and exports that you save can identify the patient: treat them as the images.',
      'The demonstration study is synthetic. It shows how the bench works and proves nothing about patients.',
    ],
  },
];
