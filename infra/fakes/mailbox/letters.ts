import {
  appendFileSync,
  existsSync,
  mkdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import { simpleParser } from 'mailparser';

export interface Attachment {
  name: string;
  type: string;
  size: number;
}

/** What the list shows of a mail; the mail itself is kept as it came, in a file of its own. */
export interface Letter {
  id: string;
  receivedAt: string;
  from: string;
  /** The addresses of the SMTP conversation, lower case: who really gets it. */
  to: string[];
  subject: string;
  messageId: string;
  attachments: Attachment[];
  /** False when the connection was cut before our answer: the sender cannot know it arrived. */
  answered: boolean;
}

export interface OpenedLetter extends Letter {
  text: string;
  html: string;
  headers: Record<string, string>;
}

/** The mails received so far, newest last; in memory only when there is no folder. */
export class Letters {
  private readonly index: Letter[] = [];
  private readonly inMemory = new Map<string, Buffer>();
  private next = 1;

  constructor(private readonly folder?: string) {
    if (!folder) return;
    mkdirSync(folder, { recursive: true });
    if (!existsSync(this.indexFile)) return;
    for (const line of readFileSync(this.indexFile, 'utf8').split('\n')) {
      const letter = parseLine(line);
      if (letter) this.index.push(letter);
    }
    this.next = this.index.reduce((last, letter) => Math.max(last, Number(letter.id)), 0) + 1;
  }

  private get indexFile(): string {
    return path.join(this.folder ?? '', 'index.jsonl');
  }

  private contentFile(id: string): string {
    return path.join(this.folder ?? '', `${id}.eml`);
  }

  async add(raw: Buffer, envelope: { from: string; to: string[] }, answered: boolean) {
    const id = String(this.next++).padStart(6, '0');
    const parsed = await simpleParser(raw);
    const letter: Letter = {
      id,
      receivedAt: new Date().toISOString(),
      from: envelope.from,
      to: envelope.to.map((address) => address.toLowerCase()),
      subject: parsed.subject ?? '',
      messageId: parsed.messageId ?? '',
      attachments: parsed.attachments.map((file, at) => ({
        name: file.filename ?? `attachment-${at + 1}`,
        type: file.contentType,
        size: file.size,
      })),
      answered,
    };
    if (this.folder) {
      writeFileSync(this.contentFile(id), raw);
      appendFileSync(this.indexFile, `${JSON.stringify(letter)}\n`);
    } else {
      this.inMemory.set(id, raw);
    }
    this.index.push(letter);
    return letter;
  }

  /** Newest first. `to` and `subject` match a part, whatever the case. */
  list(search: { to?: string; subject?: string; messageId?: string } = {}): Letter[] {
    const to = search.to?.trim().toLowerCase();
    const subject = search.subject?.toLowerCase();
    return this.index
      .filter((letter) => !to || letter.to.some((address) => address.includes(to)))
      .filter((letter) => !subject || letter.subject.toLowerCase().includes(subject))
      .filter((letter) => !search.messageId || letter.messageId === search.messageId)
      .reverse();
  }

  raw(id: string): Buffer | undefined {
    if (!this.index.some((letter) => letter.id === id)) return undefined;
    return this.folder ? readFileSync(this.contentFile(id)) : this.inMemory.get(id);
  }

  async open(id: string): Promise<OpenedLetter | undefined> {
    const letter = this.index.find((entry) => entry.id === id);
    const raw = this.raw(id);
    if (!letter || !raw) return undefined;
    const parsed = await simpleParser(raw);
    const headers = parsed.headerLines.map(({ key, line }): [string, string] => [
      key,
      line.slice(line.indexOf(':') + 1).trim(),
    ]);
    return {
      ...letter,
      text: parsed.text ?? '',
      html: parsed.html || '',
      headers: Object.fromEntries(headers),
    };
  }

  async attachment(
    id: string,
    at: number,
  ): Promise<(Attachment & { content: Buffer }) | undefined> {
    const raw = this.raw(id);
    const letter = this.index.find((entry) => entry.id === id);
    const described = letter?.attachments[at];
    if (!raw || !described) return undefined;
    const content = (await simpleParser(raw)).attachments[at]?.content;
    return content && { ...described, content };
  }

  clear(): void {
    for (const letter of this.index) {
      if (this.folder) rmSync(this.contentFile(letter.id), { force: true });
    }
    this.index.length = 0;
    this.inMemory.clear();
    if (this.folder) rmSync(this.indexFile, { force: true });
  }
}

/** A line cut short by a kill is skipped; the mails around it are whole. */
function parseLine(line: string): Letter | undefined {
  try {
    return line ? (JSON.parse(line) as Letter) : undefined;
  } catch {
    return undefined;
  }
}
