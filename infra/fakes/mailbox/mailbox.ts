import { type Answer, html, json, readBody, send, serve } from '../http';
import { page } from '../page';
import { frameRights, letterPage, listPage } from './pages';
import { Letters } from './letters';
import { Behaviour, type Mode, modes, startSmtp } from './smtp';

export interface MailboxOptions {
  /** Where mails are kept; without it they are gone with the process. */
  folder?: string;
  smtpPort?: number;
  webPort?: number;
}

export interface Mailbox {
  /** Its web page. */
  url: string;
  smtpUrl: string;
  smtpPort: number;
  webPort: number;
  letters: Letters;
  setMode(mode: Mode, times?: number, to?: string): void;
  close(): Promise<void>;
}

const absent = html(page('Not here', 'Local mailbox', '<h1>There is no such mail</h1>'), 404);

/** A file name for a header: plain ASCII, the real one beside it in RFC 8187 form. */
function disposition(name: string): string {
  const plain = name.replace(/[^\w.-]+/g, '_');
  return `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name)}`;
}

async function part(letters: Letters, id: string, rest: string): Promise<Answer> {
  if (rest === '/raw') {
    const raw = letters.raw(id);
    return raw ? { headers: { 'content-type': 'message/rfc822' }, body: raw } : absent;
  }
  const attached = /^\/attachments\/(\d+)$/.exec(rest);
  if (attached) {
    const file = await letters.attachment(id, Number(attached[1]));
    if (!file) return absent;
    const headers = {
      'content-type': file.type,
      'content-disposition': disposition(file.name),
      'x-content-type-options': 'nosniff',
    };
    return { headers, body: file.content };
  }
  const letter = await letters.open(id);
  if (!letter) return absent;
  if (rest === '') return html(letterPage(letter));
  if (rest !== '/html') return absent;
  // Links of a mail open beside it; nothing in it may run or reach further.
  const content = letter.html.replace(/<head>|^/i, (head) => `${head}<base target="_blank">`);
  return html(content, 200, {
    'content-security-policy': `default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox ${frameRights}`,
  });
}

async function answer(
  mailbox: { letters: Letters; behaviour: Behaviour },
  method: string,
  url: URL,
  body: string,
): Promise<Answer> {
  const { letters, behaviour } = mailbox;
  const query = (name: string): string => url.searchParams.get(name) ?? '';
  if (url.pathname === '/' && method === 'GET') {
    return html(listPage(letters.list({ to: query('to') }), query('to')));
  }
  if (url.pathname === '/api/mails') {
    if (method === 'DELETE') {
      letters.clear();
      return { status: 204 };
    }
    const found = letters.list({
      to: query('to'),
      subject: query('subject'),
      messageId: query('messageId'),
    });
    return json(query('limit') ? found.slice(0, Number(query('limit'))) : found);
  }
  const api = /^\/api\/mails\/(\d+)$/.exec(url.pathname);
  if (api) {
    const letter = await letters.open(api[1] ?? '');
    return letter ? json(letter) : json({ error: 'no such mail' }, 404);
  }
  const mail = /^\/mails\/(\d+)(\/.*)?$/.exec(url.pathname);
  if (mail) return part(letters, mail[1] ?? '', mail[2] ?? '');
  if (url.pathname === '/fake/mode') {
    if (method === 'GET') return json({ mode: behaviour.current });
    return setMode(behaviour, body);
  }
  return absent;
}

function setMode(behaviour: Behaviour, body: string): Answer {
  let asked: { mode?: Mode; times?: number; to?: string };
  try {
    asked = JSON.parse(body) as typeof asked;
  } catch {
    return json({ error: 'the body is not JSON' }, 400);
  }
  if (!asked.mode || !modes.includes(asked.mode)) {
    return json({ error: `mode is one of ${modes.join(', ')}` }, 400);
  }
  behaviour.set(asked.mode, asked.times, asked.to);
  return json({ mode: asked.mode });
}

/** A mail server that keeps everything and delivers nothing, with a page to read it. */
export async function startMailbox(options: MailboxOptions = {}): Promise<Mailbox> {
  const letters = new Letters(options.folder);
  const behaviour = new Behaviour();
  const smtp = await startSmtp(letters, behaviour, options.smtpPort ?? 0);
  const web = await serve(async (request, response) => {
    const url = new URL(request.url ?? '/', 'http://mailbox');
    const body = await readBody(request);
    send(response, await answer({ letters, behaviour }, request.method ?? 'GET', url, body));
  }, options.webPort ?? 0);
  return {
    url: web.url,
    webPort: web.port,
    smtpPort: smtp.port,
    smtpUrl: `smtp://127.0.0.1:${smtp.port}`,
    letters,
    setMode: (mode, times, to) => behaviour.set(mode, times, to),
    async close() {
      await Promise.all([smtp.close(), web.close()]);
    },
  };
}
