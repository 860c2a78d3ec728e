import { escapeHtml } from '../http';
import { page } from '../page';
import { type Letter, type OpenedLetter } from './letters';

/**
 * A mail's HTML gets an origin of its own, and its content policy lets no script of the mail run.
 * Scripts are not forbidden here as well, since tools that look at pages could then not look at it.
 */
export const frameRights = 'allow-scripts allow-popups allow-popups-to-escape-sandbox';

const note = 'Local mailbox. Nothing that arrives here leaves this machine.';

function time(instant: string): string {
  return `<time datetime="${instant}">${instant.slice(0, 10)} ${instant.slice(11, 19)} UTC</time>`;
}

function row(letter: Letter): string {
  const files = letter.attachments.length ? ` (${letter.attachments.length} attached)` : '';
  return `<tr><td>${time(letter.receivedAt)}</td><td>${escapeHtml(letter.to.join(', '))}</td>
<td><a href="/mails/${letter.id}">${escapeHtml(letter.subject || '(no subject)')}</a>${files}</td></tr>`;
}

const shownAtOnce = 200;

export function listPage(letters: Letter[], to: string): string {
  const shown = letters.slice(0, shownAtOnce);
  const more =
    letters.length > shown.length ? `<p>The newest ${shown.length} of ${letters.length}.</p>` : '';
  const table = shown.length
    ? `<table><thead><tr><th scope="col">Received</th><th scope="col">To</th>
<th scope="col">Subject</th></tr></thead><tbody>${shown.map(row).join('\n')}</tbody></table>`
    : '<p>No mail yet. Whatever the application sends appears here; reload to look again.</p>';
  return page(
    'Mailbox',
    note,
    `<h1>Mailbox</h1>
<form method="get" action="/"><label for="to">Address contains</label>
<input id="to" name="to" type="search" value="${escapeHtml(to)}">
<button type="submit">Show</button></form>
${table}${more}`,
  );
}

export function letterPage(letter: OpenedLetter): string {
  const files = letter.attachments
    .map(
      (file, at) =>
        `<li><a href="/mails/${letter.id}/attachments/${at}">${escapeHtml(file.name)}</a>
(${escapeHtml(file.type)}, ${file.size} bytes)</li>`,
    )
    .join('\n');
  const asHtml = letter.html
    ? `<h2>As HTML</h2>
<iframe sandbox="${frameRights}" title="The mail as HTML" src="/mails/${letter.id}/html"></iframe>`
    : '';
  return page(
    letter.subject || '(no subject)',
    note,
    `<p><a href="/">All mails</a></p>
<h1>${escapeHtml(letter.subject || '(no subject)')}</h1>
<dl><dt>To</dt><dd>${escapeHtml(letter.to.join(', '))}</dd>
<dt>From</dt><dd>${escapeHtml(letter.headers['from'] ?? letter.from)}</dd>
<dt>Received</dt><dd>${time(letter.receivedAt)}</dd>
<dt>Message-ID</dt><dd>${escapeHtml(letter.messageId)}</dd></dl>
${files ? `<h2>Attached</h2><ul>${files}</ul>` : ''}
<h2>As text</h2>
<pre>${withLinks(letter.text)}</pre>
${asHtml}
<p><a href="/mails/${letter.id}/raw">The mail as it came</a></p>`,
  );
}

/** Addresses in the text become links, since invitations and resets are followed from here. */
function withLinks(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"')\]]+)/)
    .map((piece, at) =>
      at % 2 ? `<a href="${escapeHtml(piece)}">${escapeHtml(piece)}</a>` : escapeHtml(piece),
    )
    .join('');
}
