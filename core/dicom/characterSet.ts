/** Specific Character Set (0008,0005) terms of single-byte and multi-byte sets without code extensions (PS3.3 C.12.1.1.2). */
const LABELS: Readonly<Record<string, string>> = {
  '': 'windows-1252',
  'ISO_IR 6': 'windows-1252',
  'ISO_IR 100': 'windows-1252',
  'ISO_IR 101': 'iso-8859-2',
  'ISO_IR 109': 'iso-8859-3',
  'ISO_IR 110': 'iso-8859-4',
  'ISO_IR 144': 'iso-8859-5',
  'ISO_IR 127': 'iso-8859-6',
  'ISO_IR 126': 'iso-8859-7',
  'ISO_IR 138': 'iso-8859-8',
  'ISO_IR 148': 'windows-1254',
  'ISO_IR 13': 'shift_jis',
  'ISO_IR 166': 'windows-874',
  'ISO_IR 192': 'utf-8',
  GB18030: 'gb18030',
  GBK: 'gbk',
};

const decoders = new Map<string, TextDecoder>();

function decoderOf(label: string): TextDecoder {
  const known = decoders.get(label);
  if (known !== undefined) return known;
  const decoder = new TextDecoder(label);
  decoders.set(label, decoder);
  return decoder;
}

/** Decodes text bytes of a data set whose Specific Character Set has this first value. An unknown set is read as ASCII. */
export function decodeText(bytes: Uint8Array, characterSet: string): string {
  const ascii = asciiText(bytes);
  if (ascii !== undefined) return ascii;
  const label = LABELS[characterSet.trim()];
  if (label !== undefined) return decoderOf(label).decode(bytes);
  let text = '';
  for (const byte of bytes) text += byte < 0x80 ? String.fromCharCode(byte) : '\ufffd';
  return text;
}

/** Most values are plain ASCII, in every set: they need no decoder. Undefined for all others. */
function asciiText(bytes: Uint8Array): string | undefined {
  let text = '';
  for (let i = 0; i < bytes.length; i++) {
    const byte = bytes[i] ?? 0;
    if (byte >= 0x80 || byte === 0x1b) return undefined;
    text += String.fromCharCode(byte);
  }
  return text;
}
