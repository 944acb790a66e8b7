/** Style of the exported page: paper white, made to be printed. */
export const PAGE_STYLE = `
:root { color-scheme: only light; }
body { background: #fff; color: #111; font: 10.5pt/1.4 system-ui, sans-serif; max-width: 277mm; margin: 8mm auto; padding: 0 6mm; }
h1 { font-size: 15pt; margin: 0 0 3mm; }
h2 { font-size: 12pt; margin: 6mm 0 2mm; }
h3 { font-size: 10.5pt; margin: 4mm 0 1mm; }
table { border-collapse: collapse; width: 100%; font-variant-numeric: tabular-nums; }
th, td { border: 1px solid #999; padding: 1mm 1.5mm; text-align: left; vertical-align: top; font-weight: normal; overflow-wrap: break-word; }
thead th { font-weight: 600; background: #eee; }
.number { text-align: right; }
td.number { white-space: nowrap; }
.small { font-size: 8.5pt; color: #333; overflow-wrap: anywhere; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .5mm 4mm; margin: 0; }
dt { color: #333; }
dd { margin: 0; overflow-wrap: anywhere; }
.cautions { border: 1px solid #111; padding: 2mm 2mm 2mm 7mm; margin: 3mm 0; }
.synthetic { border: 2px solid #111; padding: 2mm; margin: 3mm 0; font-weight: 700; text-align: center; letter-spacing: .06em; }
@page { size: A4 landscape; margin: 12mm; }
@media print { body { margin: 0; padding: 0; max-width: none; } thead { display: table-header-group; } tbody, tr { break-inside: avoid; } h2, h3 { break-after: avoid; } }
`;
