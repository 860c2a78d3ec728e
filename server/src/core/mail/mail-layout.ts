/** What a letter says, piece by piece. Both forms of the mail are made from the same pieces. */
export type MailPiece =
  | { words: string }
  | { facts: [label: string, value: string][] }
  | { table: MailTable }
  | { link: { label: string; url: string } };

export interface MailTable {
  caption: string;
  columns: { name: string; right?: boolean }[];
  rows: string[][];
}

export interface Letter {
  /** The subject again: what a screen reader calls the page. */
  title: string;
  /** A language tag, for the voice that reads it aloud. */
  locale?: string;
  greeting?: string;
  pieces: MailPiece[];
  /** Who writes, and how to reach them: several short lines. */
  sender: string[];
  /** Why the reader gets this mail. */
  why: string;
}

/** The text and the HTML form of a letter: no images, nothing fetched from outside. */
export function layOut(letter: Letter): { text: string; html: string } {
  return { text: asText(letter), html: asHtml(letter) };
}

function asText(letter: Letter): string {
  const pieces = letter.pieces.map((piece) => {
    if ('words' in piece) return piece.words;
    if ('facts' in piece)
      return piece.facts.map(([label, value]) => `${label}: ${value}`).join('\n');
    if ('link' in piece) return `${piece.link.label}:\n${piece.link.url}`;
    return tableText(piece.table);
  });
  const parts = [
    ...(letter.greeting ? [letter.greeting] : []),
    ...pieces,
    letter.sender.join('\n'),
    `-- \n${letter.why}`,
  ];
  return `${parts.join('\n\n')}\n`;
}

function tableText({ caption, columns, rows }: MailTable): string {
  const all = [columns.map((column) => column.name), ...rows];
  const widths = columns.map((_, at) => Math.max(...all.map((cells) => (cells[at] ?? '').length)));
  const lines = all.map((cells) =>
    columns
      .map(({ right }, at) => {
        const cell = cells[at] ?? '';
        return right ? cell.padStart(widths[at] ?? 0) : cell.padEnd(widths[at] ?? 0);
      })
      .join('  ')
      .trimEnd(),
  );
  return [caption, ...lines].join('\n');
}

const css = {
  body: 'margin:0;padding:24px 16px;background:#fbfaf5;color:#1d2436;font:16px/1.5 Rubik,Arial,sans-serif',
  page: 'max-width:36rem;margin:0 auto',
  title:
    'font-size:20px;line-height:1.3;margin:0 0 16px;padding-top:16px;border-top:4px solid #3a3f9c',
  link: 'display:inline-block;padding:12px 20px;border-radius:4px;background:#3a3f9c;color:#ffffff;text-decoration:none;font-weight:600',
  address: 'overflow-wrap:anywhere',
  cell: 'padding:4px 16px 4px 0;text-align:left;vertical-align:top;border-bottom:1px solid #d9d6cb',
  right:
    'padding:4px 0 4px 16px;text-align:right;vertical-align:top;border-bottom:1px solid #d9d6cb',
  foot: 'margin-top:32px;padding-top:16px;border-top:1px solid #d9d6cb;color:#5a6172;font-size:14px',
};

function asHtml(letter: Letter): string {
  const lang = escapeHtml(letter.locale ?? 'en');
  const greeting = letter.greeting ? `<p>${escapeHtml(letter.greeting)}</p>\n` : '';
  return `<!doctype html>
<html lang="${lang}">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(letter.title)}</title>
</head>
<body style="${css.body}">
<div style="${css.page}">
<h1 style="${css.title}">${escapeHtml(letter.title)}</h1>
${greeting}${letter.pieces.map(pieceHtml).join('\n')}
<p>${letter.sender.map(escapeHtml).join('<br>')}</p>
<p style="${css.foot}">${escapeHtml(letter.why)}</p>
</div>
</body>
</html>
`;
}

function pieceHtml(piece: MailPiece): string {
  if ('words' in piece) return `<p>${escapeHtml(piece.words).replaceAll('\n', '<br>')}</p>`;
  if ('link' in piece) {
    // The address stands there in full as well: some programs strip links, and people may check it.
    const url = escapeHtml(piece.link.url);
    return `<p><a href="${url}" style="${css.link}">${escapeHtml(piece.link.label)}</a></p>
<p style="${css.address}">${url}</p>`;
  }
  if ('table' in piece) return tableHtml(piece.table);
  const rows = piece.facts.map(
    ([label, value]) =>
      `<tr><th scope="row" style="${css.cell}">${escapeHtml(label)}</th>` +
      `<td style="${css.cell}">${escapeHtml(value)}</td></tr>`,
  );
  return `<table style="border-collapse:collapse;margin:16px 0">${rows.join('')}</table>`;
}

function tableHtml({ caption, columns, rows }: MailTable): string {
  const style = (at: number) => (columns[at]?.right ? css.right : css.cell);
  const head = columns
    .map((column, at) => `<th scope="col" style="${style(at)}">${escapeHtml(column.name)}</th>`)
    .join('');
  const body = rows.map(
    (cells) =>
      `<tr>${cells.map((cell, at) => `<td style="${style(at)}">${escapeHtml(cell)}</td>`).join('')}</tr>`,
  );
  return `<table style="border-collapse:collapse;margin:16px 0;width:100%">
<caption style="text-align:left;font-weight:600">${escapeHtml(caption)}</caption>
<thead><tr>${head}</tr></thead>
<tbody>${body.join('')}</tbody>
</table>`;
}

export function escapeHtml(text: string): string {
  const names: Record<string, string> = {
    '&': '&amp;',
    '<': '&lt;',
    '>': '&gt;',
    '"': '&quot;',
    "'": '&#39;',
  };
  return text.replace(/[&<>"']/g, (sign) => names[sign] ?? sign);
}
