/** HTTP status of each refusal that a route can answer with. An unlisted one is a mistake of the route. */
const STATUS = {
  'not-a-folder': 400,
  'folder-not-opened': 404,
  'no-such-folder': 404,
  'no-such-file': 404,
  'no-such-frame': 404,
  'no-such-character-set': 400,
  'unreadable-file': 403,
  'outside-folder': 403,
  vanished: 404,
  'file-changed': 409,
  'no-note': 404,
  'note-invalid': 400,
  'note-conflict': 412,
  'note-broken': 409,
  'note-newer': 409,
  'note-unreadable': 409,
  'note-not-written': 507,
} as const;

type Status = (typeof STATUS)[keyof typeof STATUS];

const isListed = (code: string): code is keyof typeof STATUS => Object.hasOwn(STATUS, code);

/** The status for a refusal's code. */
export function refusalStatus(code: string): Status {
  if (!isListed(code)) throw new Error(`no status for refusal: ${code}`);
  return STATUS[code];
}
