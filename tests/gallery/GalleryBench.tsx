import { useState } from 'preact/hooks';
import { COMMANDS, type Command } from '../../core/commands/index.js';
import { AppFrame } from '../../renderer/panels/AppFrame.js';
import { Header } from '../../renderer/panels/Header.js';
import { Hinge } from '../../renderer/panels/Hinge.js';
import { Ledger } from '../../renderer/panels/Ledger.js';
import { StatusLine } from '../../renderer/panels/StatusLine.js';
import { ToolBar } from '../../renderer/panels/ToolBar.js';
import { Welcome } from '../../renderer/panels/Welcome.js';
import { Histogram } from '../../renderer/plots/Histogram.js';
import { GalleryPlate } from './GalleryPlate.js';
import { evidence, note } from './inventedData.js';

const compare: readonly Command[] = ['Open', 'Fold', 'Alternate', 'Difference'].map((title, i) => ({
  id: `compare.${title.toLowerCase()}`,
  title,
  menu: 'View',
  group: 'compare',
  letter: String(i + 1),
}));
const table: readonly Command[] = COMMANDS;
const commands = table.some(({ group }) => group === 'compare') ? table : [...table, ...compare];
const softMm = Array.from({ length: 40 }, (_, i) => i * 0.5);
const sharpMm = Array.from({ length: 56 }, (_, i) => i * 0.36).filter(
  (_, i) => i !== 39 && i !== 40,
);
const spread = (mean: number, sd: number, n: number) =>
  Array.from({ length: n }, (_, i) => {
    const u = (i + 0.5) / n;
    return Math.round(mean + (sd * Math.log(u / (1 - u))) / 1.81);
  });
const softHu = spread(532.4, 59.7, 180);
const sharpHu = spread(325.1, 116, 180);
const nothing = () => {};

/** The whole bench with invented data, alive enough to be tried. */
export function GalleryBench({ state }: { readonly state: string }) {
  const [positionMm, setPositionMm] = useState(10);
  const [selectedId, setSelectedId] = useState<string | undefined>('L2');
  const [checked, setChecked] = useState(
    new Set([
      'tool.ellipse',
      'role.lumen',
      'compare.open',
      'link.scroll',
      'link.window',
      'link.view',
    ]),
  );
  const empty = state === 'empty';
  const region = empty ? undefined : note.regions.find(({ id }) => id === selectedId);
  const press = (id: string) => setChecked(new Set([...checked, id]));
  return (
    <AppFrame
      plates={empty || state === 'one' ? 'one' : 'two'}
      header={
        <Header
          identity={
            empty
              ? undefined
              : {
                  name: 'Rowan, Alder',
                  details: ['D-0101', '1958-03-02', 'CTA heart', '2026-01-10'],
                }
          }
          synthetic={!empty}
          save={
            empty
              ? { kind: 'none' }
              : state === 'failed'
                ? { kind: 'failed', reason: 'The disk is full.' }
                : {
                    kind: 'saved',
                    time: '10:42',
                    completion: 'PARTIAL',
                    verification: 'UNVERIFIED',
                  }
          }
          canPair={!empty}
          canExport={!empty}
          exports={commands.filter(({ id }) => id.startsWith('export.'))}
          keyNames="other"
          onOpenFolder={nothing}
          onChoosePair={nothing}
          onCommand={nothing}
          onContents={nothing}
          leftOut={3}
          more={[]}
          onSave={nothing}
          onCautions={nothing}
        />
      }
      tools={
        <ToolBar
          commands={commands}
          checked={checked}
          enabled={new Set(empty ? [] : commands.map(({ id }) => id))}
          windowText={empty ? undefined : 'C 300 W 1200'}
          letterKeys
          keyNames="other"
          onCommand={press}
        />
      }
      soft={
        empty ? (
          <Welcome
            recent={[
              { id: 'a', name: 'heart-2026-01', missing: false },
              { id: 'b', name: 'phantom', missing: true },
            ]}
            onOpenFolder={nothing}
            onDemonstration={nothing}
            onRecent={nothing}
          />
        ) : (
          <GalleryPlate grain={10} />
        )
      }
      sharp={<GalleryPlate grain={60} />}
      hinge={
        <Hinge
          verdict={
            empty
              ? { verdict: 'none', lines: [], evidence: [] }
              : {
                  verdict: state === 'reservations' ? 'reservations' : 'pair',
                  lines: [
                    'same phase 75 % · same frame · shift 0.02 mm',
                    'noise 6.1 → 26.9 HU · texture 0.21 → 0.47 /mm',
                  ],
                  evidence,
                  open: state === 'reservations',
                }
          }
          ruler={
            empty
              ? undefined
              : {
                  softMm,
                  sharpMm,
                  positionMm,
                  marks: note.regions.map(({ id, label, role }, i) => ({
                    regionId: id,
                    label,
                    role,
                    alongMm: [17, 10, 10.4, 4.6, 10.2][i] ?? 0,
                    selected: id === selectedId,
                  })),
                  onMove: setPositionMm,
                  onMark: setSelectedId,
                }
          }
          readout={{ region, unit: 'HU' }}
        />
      }
      ledger={
        <Ledger
          note={
            empty ? undefined : state === 'blank' ? { ...note, regions: [], contrasts: [] } : note
          }
          selectedId={empty ? undefined : selectedId}
          frozen={false}
          onSelect={setSelectedId}
          onDelete={nothing}
          onRole={nothing}
          onPlace={nothing}
          onQuote={nothing}
          onProposedQuote={nothing}
          onFinding={nothing}
          onClearFinding={nothing}
          onNoise={nothing}
          onFittedStent={nothing}
          onNewContrast={nothing}
          onContrast={nothing}
          onDeleteContrast={nothing}
        />
      }
      plot={
        <Histogram
          label={region && `${region.label} · ${region.place}`}
          soft={region ? softHu : []}
          sharp={region ? sharpHu : []}
          meanSoft={region ? 532.4 : null}
          meanSharp={region ? 325.1 : null}
          unit="HU"
        />
      }
      status={
        <StatusLine
          cursor={empty ? undefined : { positionMm: [35.3, -20.7, 10], soft: 541, sharp: 318 }}
          unit="HU"
          single={false}
          message={empty ? undefined : { text: 'Lumen 2 measured on both kernels.', tone: 'plain' }}
        />
      }
    />
  );
}
