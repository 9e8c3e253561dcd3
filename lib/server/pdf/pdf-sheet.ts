import path from 'node:path';
import PDFDocument from 'pdfkit';

/** A cell of the title block. */
export interface PdfCell {
  label: string;
  value: string;
  grow?: number;
}

const colours = {
  ink: '#16201f',
  pencil: '#5b6460',
  rule: '#b9b2a2',
  hold: '#a5311a',
  met: '#1d6a55',
} as const;
export type PdfColour = keyof typeof colours;

const MARGIN = 42;
const TITLE_BLOCK = 46;
const FOOT = 40;

const font = (name: string) => path.join(process.cwd(), 'public', 'fonts', `${name}.ttf`);

/**
 * Pages in the look of a drawing sheet: a ruled frame, the title block on every page, page numbers, and the caution at
 * the foot. Text flows; a block that does not fit begins the next page.
 */
export class PdfSheet {
  private readonly document: PDFKit.PDFDocument;
  private readonly chunks: Buffer[] = [];

  constructor(
    private readonly cells: PdfCell[],
    private readonly foot: string,
    title: string,
  ) {
    this.document = new PDFDocument({
      size: 'A4',
      bufferPages: true,
      margins: {
        top: MARGIN + TITLE_BLOCK + 16,
        bottom: MARGIN + FOOT,
        left: MARGIN + 12,
        right: MARGIN + 12,
      },
      info: { Title: title, Producer: 'Cagewright', Creator: 'Cagewright' },
    });
    this.document.registerFont('text', font('barlow-400'));
    this.document.registerFont('strong', font('barlow-600'));
    this.document.registerFont('label', font('barlow-semi-condensed-500'));
    this.document.registerFont('heading', font('barlow-semi-condensed-600'));
    this.document.registerFont('figure', font('ibm-plex-mono-500'));
    this.document.on('data', (chunk: Buffer) => this.chunks.push(chunk));
    this.document.font('text').fontSize(10).fillColor(colours.ink);
  }

  private get left(): number {
    return this.document.page.margins.left;
  }

  private get width(): number {
    return this.document.page.width - this.document.page.margins.left - this.document.page.margins.right;
  }

  private room(height: number): void {
    if (this.document.y + height > this.document.page.height - this.document.page.margins.bottom)
      this.document.addPage();
  }

  heading(text: string): this {
    this.room(60);
    this.document.moveDown(0.8).font('heading').fontSize(13).fillColor(colours.ink).text(text, this.left);
    this.document.moveDown(0.2);
    return this;
  }

  paragraph(text: string, colour: PdfColour = 'ink'): this {
    this.document
      .font('text')
      .fontSize(10)
      .fillColor(colours[colour])
      .text(text, this.left, undefined, { width: this.width });
    this.document.moveDown(0.3);
    return this;
  }

  statement(text: string, colour: PdfColour): this {
    this.document
      .font('heading')
      .fontSize(15)
      .fillColor(colours[colour])
      .text(text, this.left, undefined, { width: this.width });
    this.document.moveDown(0.3);
    return this;
  }

  /** Label and value, a line each. */
  facts(rows: [label: string, value: string][]): this {
    for (const [label, value] of rows) {
      const at = this.left + 130;
      const height = this.document
        .font('text')
        .fontSize(10)
        .heightOfString(value, { width: this.width - 130 });
      this.room(height + 4);
      const { y } = this.document;
      this.document
        .font('label')
        .fontSize(10)
        .fillColor(colours.pencil)
        .text(label, this.left, y, { width: 124 });
      this.document
        .font('text')
        .fillColor(colours.ink)
        .text(value, at, y, { width: this.width - 130 });
      this.document.y = y + height + 3;
    }
    return this;
  }

  /** A ruled table; `widths` are shares of the width, figures are set in the figures' face. */
  table(
    head: string[],
    rows: { cells: string[]; colour?: PdfColour }[],
    widths: number[],
    figures: number[] = [],
  ): this {
    const total = widths.reduce((sum, share) => sum + share, 0);
    const spans = widths.map((share) => (share / total) * this.width);
    const line = (cells: string[], look: (index: number) => void) => {
      let x = this.left;
      const { y } = this.document;
      let height = 0;
      cells.forEach((cell, index) => {
        look(index);
        const width = (spans[index] ?? 0) - 6;
        height = Math.max(height, this.document.heightOfString(cell, { width }));
        this.document.text(cell, x, y, { width });
        x += spans[index] ?? 0;
      });
      this.document.y = y + height + 2;
      this.document
        .moveTo(this.left, this.document.y)
        .lineTo(this.left + this.width, this.document.y)
        .lineWidth(0.5)
        .stroke(colours.rule);
      this.document.y += 3;
    };
    const top = () => line(head, () => this.document.font('label').fontSize(9).fillColor(colours.pencil));
    this.room(40);
    top();
    for (const row of rows) {
      if (this.document.y + 26 > this.document.page.height - this.document.page.margins.bottom) {
        this.document.addPage();
        top();
      }
      line(row.cells, (index) => {
        this.document
          .font(figures.includes(index) ? 'figure' : 'text')
          .fontSize(figures.includes(index) ? 8.5 : 9.5);
        this.document.fillColor(colours[row.colour ?? 'ink']);
      });
    }
    this.document.moveDown(0.4);
    return this;
  }

  /** Frames all pages and ends the document. */
  async finish(): Promise<Buffer> {
    const { count } = this.document.bufferedPageRange();
    for (let page = 0; page < count; page += 1) {
      this.document.switchToPage(page);
      this.frame(page + 1, count);
    }
    const ended = new Promise<void>((resolve) => this.document.once('end', () => resolve()));
    this.document.end();
    await ended;
    return Buffer.concat(this.chunks);
  }

  private frame(page: number, pages: number): void {
    const { width, height } = this.document.page;
    // Text written into the margins must not start another page.
    this.document.page.margins = { top: 0, bottom: 0, left: 0, right: 0 };
    this.document
      .lineWidth(1)
      .rect(MARGIN, MARGIN, width - 2 * MARGIN, height - 2 * MARGIN)
      .stroke(colours.ink);
    this.document
      .lineWidth(0.5)
      .rect(MARGIN - 4, MARGIN - 4, width - 2 * MARGIN + 8, height - 2 * MARGIN + 8)
      .stroke(colours.rule);
    const total = this.cells.reduce((sum, cell) => sum + (cell.grow ?? 1), 0);
    let x = MARGIN;
    for (const cell of this.cells) {
      const span = ((cell.grow ?? 1) / total) * (width - 2 * MARGIN);
      this.document.lineWidth(1).rect(x, MARGIN, span, TITLE_BLOCK).stroke(colours.ink);
      this.document
        .font('label')
        .fontSize(8)
        .fillColor(colours.pencil)
        .text(cell.label, x + 6, MARGIN + 6, { width: span - 10, lineBreak: false });
      this.document
        .font('heading')
        .fontSize(11)
        .fillColor(colours.ink)
        .text(cell.value, x + 6, MARGIN + 17, { width: span - 10, height: TITLE_BLOCK - 20, ellipsis: true });
      x += span;
    }
    this.document
      .font('text')
      .fontSize(7.5)
      .fillColor(colours.pencil)
      .text(this.foot, MARGIN + 12, height - MARGIN - FOOT + 6, {
        width: width - 2 * MARGIN - 100,
        height: FOOT - 8,
      });
    this.document.text(`Page ${page} of ${pages}`, width - MARGIN - 80, height - MARGIN - 16, {
      width: 70,
      align: 'right',
      lineBreak: false,
    });
  }
}
