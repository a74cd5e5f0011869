/** What a person wants to see of a mail; enough of RFC 5322, 2045 and 2047 for what mail programs write. */
export interface ReadMessage {
  readonly from: string;
  readonly to: string;
  readonly subject: string;
  /** The plain text; of a mail that has none, the source of its HTML. */
  readonly text: string;
  readonly attachments: readonly { readonly name: string; readonly bytes: number }[];
}

interface Part {
  readonly headers: ReadonlyMap<string, string>;
  readonly body: Buffer;
}

export function readMessage(raw: Buffer): ReadMessage {
  const message = splitPart(raw);
  const parts = leaves(message);
  const isAttachment = ({ headers }: Part) =>
    /^\s*attachment/i.test(headers.get('content-disposition') ?? '');
  const shown = parts.filter((part) => !isAttachment(part));
  const text =
    shown.find((part) => typeOf(part) === 'text/plain') ?? shown.find((part) => typeOf(part) === 'text/html');
  const header = (name: string) => decodeWords(message.headers.get(name) ?? '');
  return {
    from: header('from'),
    to: header('to'),
    subject: header('subject'),
    text: text === undefined ? '' : textOf(text),
    attachments: parts.filter(isAttachment).map((part) => ({
      name: decodeWords(parameter(part.headers.get('content-disposition') ?? '', 'filename') ?? 'unnamed'),
      bytes: decodeBody(part).length,
    })),
  };
}

/** The parts that hold content: a multipart's own parts, as deep as they go. */
function leaves(part: Part): Part[] {
  const contentType = part.headers.get('content-type') ?? '';
  const boundary = parameter(contentType, 'boundary');
  if (!/^\s*multipart\//i.test(contentType) || boundary === undefined) return [part];
  // Latin-1 keeps each byte as one character, so that the parts can be cut out of text and turned back.
  const [, ...pieces] = `\r\n${part.body.toString('latin1')}`.split(`\r\n--${boundary}`);
  return pieces
    .filter((piece) => !piece.startsWith('--'))
    .flatMap((piece) => leaves(splitPart(Buffer.from(piece.replace(/^[ \t]*\r\n/, ''), 'latin1'))));
}

function splitPart(raw: Buffer): Part {
  const text = raw.toString('latin1');
  const isBare = text.startsWith('\r\n');
  const end = text.indexOf('\r\n\r\n');
  const head = isBare ? '' : end < 0 ? text : text.slice(0, end);
  const bodyAt = isBare ? 2 : end < 0 ? text.length : end + 4;
  const headers = new Map<string, string>();
  for (const line of head.replace(/\r\n[ \t]+/g, ' ').split('\r\n')) {
    const colon = line.indexOf(':');
    if (colon > 0) headers.set(line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim());
  }
  return { headers, body: raw.subarray(bodyAt) };
}

function typeOf({ headers }: Part): string {
  return (headers.get('content-type') ?? 'text/plain').split(';')[0]!.trim().toLowerCase();
}

function textOf(part: Part): string {
  return decodeText(
    decodeBody(part),
    parameter(part.headers.get('content-type') ?? '', 'charset') ?? 'utf-8',
  );
}

function decodeBody({ headers, body }: Part): Buffer {
  const encoding = (headers.get('content-transfer-encoding') ?? '').trim().toLowerCase();
  const text = body.toString('latin1');
  if (encoding === 'base64') return Buffer.from(text, 'base64');
  if (encoding === 'quoted-printable') return decodeQuoted(text.replace(/=[ \t]*\r\n/g, ''));
  return body;
}

function decodeQuoted(text: string): Buffer {
  return Buffer.from(
    text.replace(/=([0-9a-f]{2})/gi, (_, hex: string) => String.fromCharCode(parseInt(hex, 16))),
    'latin1',
  );
}

/** Encoded words of a header, =?charset?B or Q?…?=; the space between two of them is not part of the text. */
function decodeWords(header: string): string {
  return Buffer.from(header, 'latin1')
    .toString('utf8')
    .replace(/(\?=)\s+(=\?)/g, '$1$2')
    .replace(/=\?([^?]+)\?([bq])\?([^?]*)\?=/gi, (_, charset: string, kind: string, word: string) =>
      decodeText(
        kind.toLowerCase() === 'b' ? Buffer.from(word, 'base64') : decodeQuoted(word.replaceAll('_', ' ')),
        charset,
      ),
    );
}

function decodeText(bytes: Buffer, charset: string): string {
  try {
    return new TextDecoder(charset).decode(bytes);
  } catch {
    return bytes.toString('latin1'); // a charset nobody knows: every byte is shown as it is
  }
}

function parameter(header: string, name: string): string | undefined {
  const found = new RegExp(`;\\s*${name}\\s*=\\s*(?:"([^"]*)"|([^;\\s]+))`, 'i').exec(header);
  return found?.[1] ?? found?.[2];
}
