import type { NoteProfile } from '../../core/note/index.js';
import { profileRows } from '../plots/profileTableRows.js';
import { FlagSign } from './parts/StateSign.js';

/** The selected profile's numbers on both kernels in the hinge. */
export function ProfileReadout({ profile }: { readonly profile: NoteProfile }) {
  const flags = new Set(
    [...(profile.soft?.flags ?? []), ...(profile.sharp?.flags ?? [])].map(({ text }) => text),
  );
  return (
    <section class="readout">
      <h2>
        <span>{`${profile.label} · ${profile.sharp?.kind ?? profile.soft?.kind ?? 'no width'}`}</span>
      </h2>
      <table>
        <caption class="visually-hidden">Widths on both kernels</caption>
        <thead>
          <tr>
            <th scope="col">soft</th>
            <th scope="col"> </th>
            <th scope="col">sharp</th>
          </tr>
        </thead>
        <tbody>
          {profileRows(profile).map((row) => (
            <tr key={row.name} title={row.title}>
              <td class="soft" title={row.soft.reason || row.title}>
                {row.soft.text}
              </td>
              <th scope="row">{`${row.name} ${row.unit}`}</th>
              <td class="sharp" title={row.sharp.reason || row.title}>
                {row.sharp.text}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {flags.size > 0 && (
        <ul class="flags" aria-label="Flags of this profile">
          {[...flags].map((text) => (
            <li key={text}>
              <FlagSign />
              <span>{text}</span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
