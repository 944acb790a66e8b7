const LONGEST = 120;

/** Names that Windows keeps for devices (Microsoft, "Naming Files, Paths, and Namespaces"). */
const DEVICE = /^(con|prn|aux|nul|com[0-9¹²³]|lpt[0-9¹²³])(\.|$)/i;

/** Characters that a name can't hold on Windows, and the slash; each becomes '-'. */
const FORBIDDEN = '<>:"/\\|?*';

/**
 * The name proposed in the save dialog: the page's, without anything that means a folder or is
 * forbidden on one of the systems. The reader can change it.
 */
export function safeFileName(proposed: string): string {
  const cleaned = [...proposed.normalize('NFC')]
    .filter((character) => !isControl(character))
    .map((character) => (FORBIDDEN.includes(character) ? '-' : character))
    .join('')
    .replace(/^[. ]+|[. ]+$/g, '');
  const { stem, extension } = splitName(cleaned);
  const short = `${[...stem].slice(0, LONGEST - extension.length).join('')}${extension}`;
  if (short === '' || short === extension) return `export${extension}`;
  return DEVICE.test(short) ? `_${short}` : short;
}

/** Stem and extension with its dot; no extension when what follows the last dot is no short word. */
export function splitName(name: string): { readonly stem: string; readonly extension: string } {
  const found = /\.[a-z0-9]{1,8}$/i.exec(name);
  if (found === null) return { stem: name, extension: '' };
  return { stem: name.slice(0, found.index), extension: found[0] };
}

/** Control characters, and marks that reverse the direction of text and so disguise an extension. */
function isControl(character: string): boolean {
  return /[\p{Cc}\u200e\u200f\u202a-\u202e\u2066-\u2069]/u.test(character);
}
