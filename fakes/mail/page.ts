import type { KeptMessage } from './mail-fake';

export const style = `
:root { color-scheme: light dark; font-family: system-ui, sans-serif; line-height: 1.4; }
body { max-width: 60rem; margin: 2rem auto; padding: 0 1rem; }
table { border-collapse: collapse; width: 100%; }
caption { text-align: start; padding-block: 0.5rem; }
th, td { text-align: start; padding: 0.4rem 0.6rem; border-bottom: 1px solid GrayText; vertical-align: top; }
pre { white-space: pre-wrap; overflow-wrap: anywhere; }
`;

/** The list of messages, newest first. */
export function listPage(messages: readonly KeptMessage[], mode: string): string {
  const rows = messages.map(
    ({ id, receivedAt, from, to, subject }) =>
      `<tr><td>${time(receivedAt)}</td><td>${escapeHtml(from)}</td><td>${escapeHtml(to.join(', '))}</td>` +
      `<td><a href="/message/${id}">${escapeHtml(subject || '(no subject)')}</a></td></tr>`,
  );
  const table =
    rows.length === 0
      ? '<p>No mail yet.</p>'
      : `<table><caption>${rows.length} kept, newest first; times are UTC</caption>
<thead><tr><th scope="col">Received</th><th scope="col">From</th><th scope="col">To</th><th scope="col">Subject</th></tr></thead>
<tbody>${rows.join('\n')}</tbody></table>`;
  return page(
    'Mail of the demonstration',
    `<p>Nothing leaves this machine. This server takes mail in mode “${escapeHtml(mode)}”.</p>${table}`,
  );
}

export function messagePage({ receivedAt, from, to, subject, text, attachments }: KeptMessage): string {
  const files = attachments.map(({ name, bytes }) => `<li>${escapeHtml(name)}, ${bytes} bytes</li>`);
  return page(
    subject || '(no subject)',
    `<p><a href="/">All mail</a></p>
<dl><dt>Received</dt><dd>${time(receivedAt)} UTC</dd><dt>From</dt><dd>${escapeHtml(from)}</dd><dt>To</dt><dd>${escapeHtml(to.join(', '))}</dd></dl>
<pre>${escapeHtml(text)}</pre>
${files.length === 0 ? '' : `<h2>Attachments</h2><ul>${files.join('')}</ul>`}`,
  );
}

function page(title: string, content: string): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escapeHtml(title)}</title>
<link rel="stylesheet" href="/style.css"></head>
<body><main><h1>${escapeHtml(title)}</h1>${content}</main></body></html>
`;
}

function time(t: number): string {
  return new Date(t).toISOString().slice(0, 16).replace('T', ' ');
}

const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character);
}
