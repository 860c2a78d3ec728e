import PDFDocument from 'pdfkit';
import { type Run, type Weight, rubik, runsOf } from './rubik';

export interface Style {
  size?: number;
  weight?: Weight;
  color?: string;
  align?: 'left' | 'right';
}

export interface Cell extends Style {
  text: string;
  x: number;
  width: number;
}

const ink = '#1d2436';
const leading = 1.35;

/** Figures of one width in columns of amounts; elsewhere the library's cache of words is used. */
function figures(style: Style): { features?: PDFKit.Mixins.OpenTypeFeatures[] } {
  return style.align === 'right' ? { features: ['tnum'] } : {};
}

type Structure = PDFKit.PDFStructureElement;

/**
 * A tagged PDF set in Rubik, written from top to bottom. The same calls give the same bytes: the
 * date in it is the one it is given, and nothing else in it varies.
 */
export class Sheet {
  readonly doc: PDFKit.PDFDocument;
  readonly left = 48;
  readonly width: number;
  y: number;
  private readonly root: Structure;
  private readonly bottom: number;
  private readonly chunks: Buffer[] = [];
  private readonly fonts = new Set<string>();
  private onNewPage: (() => void) | undefined;

  constructor(options: {
    title: string;
    author: string;
    lang: string;
    created: Date;
    size: 'A4' | 'LETTER';
  }) {
    this.doc = new PDFDocument({
      size: options.size,
      margin: 0,
      // None, instead of the library's own that nothing here is set in.
      font: '',
      pdfVersion: '1.7',
      tagged: true,
      lang: options.lang,
      displayTitle: true,
      bufferPages: true,
      info: {
        Title: options.title,
        Author: options.author,
        CreationDate: options.created,
        ModDate: options.created,
      },
    });
    this.doc.on('data', (chunk: Buffer) => this.chunks.push(chunk));
    this.root = this.doc.struct('Document');
    this.doc.addStructure(this.root);
    this.width = this.doc.page.width - 2 * this.left;
    this.bottom = this.doc.page.height - 64;
    this.y = 48;
  }

  /** One paragraph or heading over the whole width, or in a column of it. */
  say(tag: 'H1' | 'H2' | 'P', text: string, style: Style & { x?: number; width?: number } = {}) {
    const cell = { text, x: this.left, width: this.width, ...style };
    const lines = this.wrap(cell);
    this.room(lines.length * this.lineHeight(cell));
    this.tagged(tag, this.root, () => this.draw(cell, lines, this.y));
    this.y += lines.length * this.lineHeight(cell);
  }

  /** A rule across the page; it means nothing, so it is an artifact. */
  rule(color: string, thickness = 0.5): void {
    this.artifact(() => {
      this.doc.rect(this.left, this.y, this.width, thickness).fill(color);
    });
    this.y += thickness;
  }

  space(points: number): void {
    this.y += points;
  }

  /** Rows of cells; the header is repeated, as an artifact, at the top of each further page. */
  table(head: readonly Cell[], rows: Iterable<{ cells: readonly Cell[]; ruled?: boolean }>): void {
    const table = this.doc.struct('Table');
    this.root.add(table);
    this.row(table, 'TH', head);
    this.onNewPage = () => this.artifact(() => this.drawRow(head));
    for (const { cells, ruled } of rows) {
      if (ruled) {
        this.space(3);
        this.rule('#d9d6cb');
        this.space(3);
      }
      this.row(table, 'TD', cells);
    }
    this.onNewPage = undefined;
  }

  /** Ends the document, with a line at the foot of each page. */
  async end(foot: (page: number, pages: number) => string): Promise<Buffer> {
    const { start, count } = this.doc.bufferedPageRange();
    for (let page = start; page < start + count; page += 1) {
      this.doc.switchToPage(page);
      const cell = { text: foot(page + 1, count), x: this.left, width: this.width, size: 8 };
      const y = this.doc.page.height - 40;
      this.artifact(() => this.draw({ ...cell, color: '#5a6172' }, this.wrap(cell), y));
    }
    this.root.end();
    const done = new Promise<void>((resolve) => this.doc.once('end', resolve));
    this.doc.end();
    await done;
    return Buffer.concat(this.chunks);
  }

  private row(table: Structure, tag: 'TH' | 'TD', cells: readonly Cell[]): void {
    const laid = cells.map((cell) => ({ cell, lines: this.wrap(cell) }));
    const height = Math.max(...laid.map(({ cell, lines }) => lines.length * this.lineHeight(cell)));
    this.room(height);
    const row = this.doc.struct('TR');
    table.add(row);
    for (const { cell, lines } of laid) {
      this.tagged(tag, row, () => this.draw(cell, lines, this.y));
    }
    row.end();
    this.y += height;
  }

  private drawRow(cells: readonly Cell[]): void {
    const heights = cells.map((cell) => {
      const lines = this.wrap(cell);
      this.draw(cell, lines, this.y);
      return lines.length * this.lineHeight(cell);
    });
    this.y += Math.max(...heights);
  }

  /** Goes on on a new page when what comes is higher than what is left. */
  private room(height: number): void {
    if (this.y + height <= this.bottom) return;
    this.doc.addPage();
    this.y = 48;
    this.onNewPage?.();
  }

  private tagged(tag: string, parent: Structure, draw: () => void): void {
    const content = this.doc.markStructureContent(tag);
    draw();
    this.doc.endMarkedContent();
    parent.add(this.doc.struct(tag, {}, [content]));
  }

  private artifact(draw: () => void): void {
    this.doc.markContent('Artifact', { type: 'Layout' });
    draw();
    this.doc.endMarkedContent();
  }

  private lineHeight(style: Style): number {
    return (style.size ?? 9.5) * leading;
  }

  private use(run: Run, style: Style): void {
    const weight = style.weight ?? 400;
    const name = `${run.subset}-${weight}`;
    if (!this.fonts.has(name)) {
      // The library takes a font that is read already; only its types do not say so yet.
      this.doc.registerFont(name, rubik(run.subset, weight) as unknown as Buffer);
      this.fonts.add(name);
    }
    this.doc.font(name).fontSize(style.size ?? 9.5);
  }

  private widthOf(text: string, style: Style): number {
    let width = 0;
    for (const run of runsOf(text)) {
      this.use(run, style);
      width += this.doc.widthOfString(run.text, figures(style));
    }
    return width;
  }

  private wrap(cell: Cell): string[] {
    return cell.text.split('\n').flatMap((paragraph) => this.wrapParagraph(paragraph, cell));
  }

  private wrapParagraph(text: string, cell: Cell): string[] {
    if (this.widthOf(text, cell) <= cell.width) return [text];
    const lines: string[] = [];
    let line = '';
    let width = 0;
    const space = this.widthOf(' ', cell);
    for (const word of text.split(' ').flatMap((each) => this.pieces(each, cell))) {
      const added = this.widthOf(word, cell);
      if (line !== '' && width + space + added > cell.width) {
        lines.push(line);
        line = '';
        width = 0;
      }
      width += (line === '' ? 0 : space) + added;
      line = line === '' ? word : `${line} ${word}`;
    }
    return [...lines, line];
  }

  /** A word longer than its column is cut where it must be. */
  private pieces(word: string, cell: Cell): string[] {
    if (word.length < 8 || this.widthOf(word, cell) <= cell.width) return [word];
    const pieces: string[] = [];
    let piece = '';
    for (const character of word) {
      if (piece !== '' && this.widthOf(piece + character, cell) > cell.width) {
        pieces.push(piece);
        piece = '';
      }
      piece += character;
    }
    return [...pieces, piece];
  }

  private draw(cell: Cell, lines: readonly string[], top: number): void {
    this.doc.fillColor(cell.color ?? ink);
    lines.forEach((line, index) => {
      const y = top + index * this.lineHeight(cell);
      let x = cell.x;
      if (cell.align === 'right') x += cell.width - this.widthOf(line, cell);
      const runs = runsOf(line);
      for (const [at, run] of runs.entries()) {
        this.use(run, cell);
        this.doc.text(run.text, x, y, { lineBreak: false, ...figures(cell) });
        if (at < runs.length - 1) x += this.doc.widthOfString(run.text, figures(cell));
      }
    });
  }
}
