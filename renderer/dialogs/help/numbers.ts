/** What a number of the bench means, and where that comes from. */
export interface NumberHelp {
  readonly title: string;
  readonly text: readonly string[];
  /** A formula, in one line. */
  readonly formula?: string;
  readonly source: string;
}

/** The meaning of every number that the window, the note and the exports show. */
export const NUMBERS: readonly NumberHelp[] = [
  {
    title: 'Position',
    text: [
      'Places are in the patient’s own coordinates: L to the left, P to the back, H to the head, in mm. Slices are ordered and spaced by their position along the stack’s normal, never by instance number, slice location or thickness.',
    ],
    source: 'DICOM PS3.3 C.7.6.2.1.1.',
  },
  {
    title: 'HU',
    text: [
      'A stored value times the slope plus the intercept of its own slice. Padding is left out. A stack without a rescale, or in another unit, is shown but not measured in HU.',
    ],
    formula: 'HU = slope × stored value + intercept',
    source: 'DICOM PS3.3 C.11.1, C.7.5.1.1.2.',
  },
  {
    title: 'A region and its pixels',
    text: [
      'A region is a shape in patient space. It is measured on each kernel over the pixels whose centres lie inside it, edge included, with nothing resampled. On the other stack it lies on the nearest slice if that is within half a slice spacing; the distance is kept. Otherwise it is not measured there.',
      'Area is that of the shape; sampled area is the number of pixels times the area of one. Where the two differ much, the region is too small for the grid.',
    ],
    source: 'Diptych’s own rule.',
  },
  {
    title: 'Mean and SD',
    text: [
      'Arithmetic mean and sample standard deviation, with n − 1. The difference in the middle column is sharp minus soft.',
    ],
    formula: 'SD = √(Σ(x − mean)² / (n − 1))',
    source: 'Any textbook of statistics; checked against the NIST Statistical Reference Datasets.',
  },
  {
    title: 'SNR and its bands',
    text: [
      'Mean over SD of the same region. Up to 1 is called unreadable, up to 2 poor, 2 to 4 tolerable at best, above 4 diagnostic. The bands are an aid, never a verdict. With an SD of zero there is no SNR.',
    ],
    formula: 'SNR = mean / SD',
    source: 'Bands: common practice, no source.',
  },
  {
    title: 'CNR',
    text: [
      'Lumen minus wall over the noise. The note names whose SD the noise is: lumen, wall, a reference region, or lumen and wall pooled. Values under different noises are not comparable; a review of coronary CT papers found that using the vessel’s own SD changes results most.',
    ],
    formula: 'CNR = (lumen − wall) / noise;  pooled noise = √((SD₁² + SD₂²) / 2)',
    source: 'Formulas in use: Acta Radiol 2021, doi 10.1177/02841851211041813.',
  },
  {
    title: 'Standard error of a mean',
    text: [
      'How far noise alone moves the mean of a region. Neighbouring pixels share their noise, so SD/√n is wrong, on a soft kernel several times too small. Here the noise power spectrum of each kernel is measured in the uniform areas that the pair has in common; it gives the correlation between any two pixels, and the sum over all pairs of pixels of the region gives the error of their mean. The mean ± 1.96 standard errors holds what the mean would be without noise in about 95 of 100 scans.',
      'The noise σ is that of the uniform areas, the near ones counting more; never the SD of the region itself, which holds structure too. What detrending takes from the lowest frequencies is given back; below 0.08 per mm, which no area of 12 mm can tell, the noise is taken rather too high than too low, so that the error of a region wider than 10 mm is somewhat overstated. Where a single stack is read, or the two have fewer than four uniform areas in common, there is no standard error.',
      'It says nothing of blur, of a misplaced outline or of structure inside the region.',
    ],
    formula: 'SE² = σ²/n² × ΣΣ ρ over all pairs of pixels;  not SD²/n',
    source:
      'Variance of a mean of correlated values: any textbook of time series. Noise power spectrum: AAPM report 233, 2019. Detrending undone after Richardson 1972, doi 10.1364/JOSA.62.000055.',
  },
  {
    title: 'Placement',
    text: [
      'How far the mean moves, at most, when the region is placed a little otherwise: moved by half a pixel in eight directions, and its edge moved by 0.25 mm outwards and inwards (both half axes of an ellipse, each side of an outline). It is large where an edge is near, whatever the noise. A region so small that one of these holds no pixel has none.',
    ],
    source: 'Diptych’s own rule.',
  },
  {
    title: 'One acquisition',
    text: [
      'The two series are compared in what their headers state: patient, study, frame of reference, acquisition, phase, overlap, tilt, thickness, tube voltage. Then a few slices are compared: the shift between them in several places, and noise, texture and edges in the same places of both, which tell the softer from the sharper. Each line of evidence agrees, differs, or is unknown because a file is silent. Kernel labels are shown as the files have them and never interpreted.',
      'The same frame of reference means shared coordinates; it does not prove that nothing moved between two phases.',
    ],
    source: 'DICOM PS3.3 C.7.4.1, C.7.6.2; weighing of the evidence: Diptych’s own rule.',
  },
  {
    title: 'Histogram',
    text: [
      'Both kernels’ pixels of the selected region in the same bins, as wide as the rule of Freedman and Diaconis says for both together, never finer than 1 HU. The short upright lines are the means.',
    ],
    formula: 'bin width = 2 × IQR / ∛n',
    source: 'Freedman & Diaconis 1981, Z Wahrscheinlichkeitstheorie verw Gebiete 57:453.',
  },
  {
    title: 'What could be seen',
    text: [
      'The smallest disc that stands out k times its noise for a matched filter that knows its shape and place, from the noise spectrum and the blur that were measured on each kernel. k is 3 to 5; 5 is the classic value. The contrast is the disc’s own, before blur: that of a lumen and a wall of the note as each kernel shows it, or one that you type.',
      'It is an ideal observer’s figure: the background is even, with the noise of the uniform areas, and nothing else looks like the disc. In a real vessel less is seen. Below 20 HU an eye tells nothing apart even under ideal conditions (common practice, no source).',
    ],
    formula: 'd′² = [∬|W|²·TTF²]² / ∬|W|²·TTF²·NPS ≥ k²',
    source:
      'AAPM report 233, 2019; Samei 2019, Med Phys 46:e735, doi 10.1002/mp.13763. Criterion: Rose 1948, J Opt Soc Am 38:196.',
  },
  {
    title: 'Segments',
    text: ['The model with 18 segments. Which of them a heart has depends on its dominance.'],
    source:
      'Raff 2009, J Cardiovasc Comput Tomogr 3:122; Leipsic 2014, J Cardiovasc Comput Tomogr 8:342.',
  },
  {
    title: 'Noise and sharpness of a kernel',
    text: [
      'Noise SD, noise power spectrum and its mean and peak frequency are measured in the same uniform areas of both stacks, after the trend of each area was taken away. The rise distance is that of edges that were found in both.',
    ],
    source:
      'Noise power spectrum: AAPM Report 233 (2019). Rise distance and blur of a Gaussian: 2.5631 σ and 2.3548 σ.',
  },
  {
    title: 'Edge line',
    text: [
      'The pixels in the band of a line are fitted by one step that a Gaussian has blurred, along a curve of its own, so that the line need not cross the edge at right angles. Rise is the 10–90 % distance of that step across the edge; blur its full width at half maximum. The standard error allows for noise that neighbouring pixels share; where the noise is as coarse as the edge it is too small by up to a third. Crossings is the same distance read off the profile itself.',
      'Where there is no single clear edge with even sides, or padding lies in the band, there is no value but the reason. The blur holds for that edge in that place: a slanting wall or a moving vessel widens it.',
    ],
    formula: 'FWHM = rise / 2.5631 × 2.3548',
    source: 'Quantiles of the normal distribution; least squares by Levenberg and Marquardt.',
  },
  {
    title: 'Profile',
    text: [
      'A line across a vessel, averaged over its band, in steps of a quarter of a pixel by cubic interpolation. Two peaks that stand out from noise and from the rest are struts: the visible width lies between the inner half-height points, midway between each peak and the median of the middle third between the peaks. Without struts it lies between the half-height points of the whole hump. Blurred struts move their peaks inwards and their half-height points into the lumen: a visible width is no diameter.',
      'Artificial lumen narrowing needs the nominal inner diameter, which you type.',
    ],
    formula: 'narrowing = 1 − visible width / nominal inner diameter',
    source: 'Half height and artificial narrowing: common practice, no source.',
  },
  {
    title: 'Fitted stent',
    text: [
      'A lumen in a thin ring of struts in a wall in fat, blurred by one Gaussian and by each kernel, is fitted to both kernels at once, over the slices next to the click. What a kernel does to detail is read off its own noise: after filtered back projection the noise power is the ramp times the square of the kernel’s response. Strut diameter is that of the circle in the middle of the struts: the inner diameter and one strut thickness.',
      'The standard errors come from the fit, with noise that both kernels share and with what is not known of the kernels; beside them stand those of refits to simulated noise. No value is given, and the reason told, where the noise does not look like that of filtered back projection, where no ring stands out, where calcium or a second stent lies near, where the vessel bends or runs more than 25° oblique to the slices, and where the fit leaves structure over. Then an oblique cut may help.',
      'It was tried on synthetic phantoms only: no motion, no beam hardening, even lumens, round stents. Look at what the fit leaves over on both plates (letter D) before you quote it.',
    ],
    formula: 'NPS(f) = c² · f · W(f)²',
    source:
      'Riederer, Pelc & Chesler 1978, Phys Med Biol 23:446, doi 10.1088/0031-9155/23/3/008; Kijewski & Judy 1987, Phys Med Biol 32:565, doi 10.1088/0031-9155/32/5/003.',
  },
  {
    title: 'Oblique cut',
    text: [
      'A plane at right angles to the line between two points on the vessel’s course, cut from both stacks at the same places in the patient’s space, by trilinear interpolation or cubic convolution, or as the mean of a slab. It is resampled and says so: noise is smoothed by it, so that SD is smaller and SNR seems better than on slices; there is no standard error, and struts close by are not looked for. A fitted stent on a cut knows the kernel, the thickness of the slices and the interpolation as the plane sees them; where the slices smear more than 0.56 mm in the plane it gives no value.',
      'What is measured on a plane holds it where it is. As long as nothing is, the page keys and the wheel move it along the vessel.',
    ],
    source:
      'Cubic convolution: Keys 1981, IEEE Trans Acoust 29:1153, doi 10.1109/TASSP.1981.1163711.',
  },
];
