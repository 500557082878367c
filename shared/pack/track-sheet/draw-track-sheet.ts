import type { PDFDocument, PDFPage, RGB } from 'pdf-lib';
import type { CheckReport } from '../../report/check-report.ts';
import { describeTrackSheet, type SheetTrack, type TrackSheet } from './describe-track-sheet.ts';
import {
  embedSheetFonts,
  type LoadSheetFont,
  type SheetFace,
  type SheetFonts,
} from './sheet-fonts.ts';

/** A4 (ISO 216) in points of 1/72 inch, and the margins the sheet keeps. */
const pageWidth = 595.28;
const pageHeight = 841.89;
const margin = 42;
const textWidth = pageWidth - 2 * margin;
const footerHeight = 28;

/** Where the columns of the list of tracks begin, from the left margin. */
const columns = { form: 200, length: 300, peak: 348, done: 408 };

const noFontWords =
  'This sheet has no letters for some of the characters; they stand as their Unicode numbers in square brackets. The names of the files are right.';
const promiseWords =
  'What is not listed here was not found by any of the checks. That is no guarantee that there is nothing.';

/**
 * Draws the track sheet of a report as PDF. The libraries are loaded when they are needed. No
 * date and no chance is in it: the same report gives the same bytes.
 */
export async function drawTrackSheet(
  report: CheckReport,
  loadFont: LoadSheetFont,
): Promise<Uint8Array> {
  const [{ PDFDocument, rgb }, { default: fontkit }] = await Promise.all([
    import('pdf-lib'),
    import('@pdf-lib/fontkit'),
  ]);
  const document = await PDFDocument.create({ updateMetadata: false });
  document.registerFontkit(fontkit);
  const sheet = describeTrackSheet(report);
  document.setTitle(`${sheet.title} - track sheet`);
  document.setProducer('Flightcase');
  document.setCreationDate(new Date(0));
  document.setModificationDate(new Date(0));
  const fonts = await embedSheetFonts(document, textsOf(sheet), loadFont);
  const pen = new Pen(document, fonts, {
    ink: rgb(0.106, 0.129, 0.114),
    second: rgb(0.349, 0.384, 0.357),
    line: rgb(0.855, 0.835, 0.776),
    tape: rgb(1, 0.996, 0.965),
    green: rgb(0.051, 0.365, 0.294),
  });
  drawHead(pen, sheet);
  drawTracks(pen, sheet.tracks);
  for (const { heading, lines } of sheet.sections) {
    pen.heading(heading);
    for (const line of lines) pen.paragraph(line);
  }
  drawFindings(pen, sheet);
  if (sheet.notes !== null && sheet.notes.trim() !== '') {
    pen.heading('Notes from the artist');
    for (const line of sheet.notes.split(/\r?\n/)) pen.paragraph(line);
  }
  pen.space(10);
  pen.paragraph(promiseWords, 'second');
  if (fonts.hasEscapes) pen.paragraph(noFontWords, 'second');
  pen.numberPages(sheet.title);
  return document.save();
}

/** Everything that will be drawn, so that the fonts for it can be chosen. */
function textsOf(sheet: TrackSheet): string[] {
  return [JSON.stringify(sheet).replace(/\\n/g, ' '), noFontWords, promiseWords];
}

type Colour = 'ink' | 'second' | 'line' | 'tape' | 'green';
type Style = { face: SheetFace; size: number; colour: Colour };

const body: Style = { face: 'sans-400', size: 9, colour: 'ink' };

/** Writes from top to bottom and turns to a new page where one is full. */
class Pen {
  private page: PDFPage;
  private y = 0;

  constructor(
    private readonly document: PDFDocument,
    private readonly fonts: SheetFonts,
    private readonly colours: Record<Colour, RGB>,
  ) {
    this.page = this.turnPage();
  }

  private turnPage(): PDFPage {
    this.page = this.document.addPage([pageWidth, pageHeight]);
    this.y = pageHeight - margin;
    return this.page;
  }

  /** Makes sure that this much height is left on the page. */
  keep(height: number): void {
    if (this.y - height < margin + footerHeight) this.turnPage();
  }

  space(height: number): void {
    this.y -= height;
  }

  width(text: string, { face, size }: Style): number {
    return this.fonts
      .runs(text, face)
      .reduce((sum, run) => sum + run.font.widthOfTextAtSize(run.text, size), 0);
  }

  /** Draws one line of text with its baseline `down` points below where the pen is. */
  text(text: string, x: number, down: number, { face, size, colour }: Style): void {
    let at = margin + x;
    for (const { text: piece, font } of this.fonts.runs(text, face)) {
      this.page.drawText(piece, {
        x: at,
        y: this.y - down,
        size,
        font,
        color: this.colours[colour],
      });
      at += font.widthOfTextAtSize(piece, size);
    }
  }

  /** Text from right to left, for numbers that stand under each other. */
  textRight(text: string, x: number, down: number, style: Style): void {
    this.text(text, x - this.width(text, style), down, style);
  }

  /** A strip of tape: what a mixing desk has under its faders. */
  tape(x: number, height: number, width: number): void {
    this.page.drawRectangle({
      x: margin + x,
      y: this.y - height,
      width,
      height,
      color: this.colours.tape,
      borderColor: this.colours.line,
      borderWidth: 0.7,
    });
  }

  rule(colour: Colour, thickness: number): void {
    this.page.drawLine({
      start: { x: margin, y: this.y },
      end: { x: pageWidth - margin, y: this.y },
      thickness,
      color: this.colours[colour],
    });
  }

  heading(words: string): void {
    this.keep(40);
    this.space(22);
    this.text(words, 0, 0, { face: 'sans-600', size: 11, colour: 'green' });
    this.space(5);
    this.rule('line', 0.7);
    this.space(3);
  }

  paragraph(words: string, colour: Colour = 'ink', x = 0): void {
    for (const line of this.wrap(words, textWidth - x, { ...body, colour })) {
      this.keep(12);
      this.space(12);
      this.text(line, x, 0, { ...body, colour });
    }
  }

  /** Breaks at spaces, and within what is longer than a line. */
  wrap(words: string, width: number, style: Style): string[] {
    const lines: string[] = [];
    let line = '';
    for (const word of words.split(/ +/)) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (this.width(longer, style) <= width) {
        line = longer;
        continue;
      }
      if (line !== '') lines.push(line);
      line = '';
      for (const character of word) {
        if (line !== '' && this.width(line + character, style) > width) {
          lines.push(line);
          line = '';
        }
        line += character;
      }
    }
    return [...lines, line];
  }

  numberPages(title: string): void {
    const pages = this.document.getPages();
    for (const [index, page] of pages.entries()) {
      this.page = page;
      this.y = margin;
      const style: Style = { face: 'sans-400', size: 8, colour: 'second' };
      this.text(title, 0, 0, style);
      this.textRight(`${index + 1} of ${pages.length}`, textWidth, 0, style);
    }
  }
}

function drawHead(pen: Pen, sheet: TrackSheet): void {
  const title: Style = { face: 'sans-600', size: 22, colour: 'ink' };
  for (const line of pen.wrap(sheet.title, textWidth, title)) {
    pen.space(24);
    pen.text(line, 0, 0, title);
  }
  if (sheet.artist !== '') {
    pen.space(17);
    pen.text(sheet.artist, 0, 0, { face: 'sans-400', size: 13, colour: 'second' });
  }
  pen.space(14);
  pen.rule('green', 2);
  pen.space(4);
  const facts = sheet.facts.filter(([, value]) => value !== '');
  const third = textWidth / 3;
  for (let row = 0; row < facts.length; row += 3) {
    pen.space(26);
    for (const [place, [label, value]] of facts.slice(row, row + 3).entries()) {
      pen.text(label, place * third, -11, { face: 'sans-400', size: 8, colour: 'second' });
      pen.text(value, place * third, 0, { face: 'sans-600', size: 10, colour: 'ink' });
    }
  }
}

const tapeHeight = 15;
const label: Style = { face: 'sans-600', size: 9, colour: 'ink' };
const figures: Style = { face: 'mono-400', size: 8, colour: 'ink' };
const small: Style = { face: 'sans-400', size: 8, colour: 'second' };

function drawTracks(pen: Pen, tracks: readonly SheetTrack[]): void {
  pen.heading('Tracks');
  for (const track of tracks) {
    const name = pen.wrap(track.name, columns.form - 22, label);
    const done = pen.wrap(track.done, textWidth - columns.done, small);
    const labelHeight = tapeHeight + (name.length - 1) * 11;
    const height = Math.max(labelHeight, done.length * 10 + 3) + 3;
    pen.keep(height);
    pen.space(3);
    pen.tape(0, labelHeight, columns.form - 12);
    for (const [index, line] of name.entries()) pen.text(line, 5, 11 + index * 11, label);
    pen.text(track.form, columns.form, 11, small);
    pen.textRight(track.length, columns.length + 32, 11, figures);
    pen.textRight(track.peak, columns.peak + 52, 11, figures);
    for (const [index, line] of done.entries())
      pen.text(line, columns.done, 11 + index * 10, small);
    pen.space(height - 3);
  }
}

const levelWords = { 'must-fix': 'Must fix', look: 'Look', note: 'Note' } as const;

function drawFindings(pen: Pen, { findings }: TrackSheet): void {
  pen.heading('Still to know');
  if (findings.length === 0) pen.paragraph('Nothing was found that is still open.');
  for (const { level, title, text, answer } of findings) {
    pen.keep(38);
    pen.space(15);
    pen.text(levelWords[level], 0, 0, { ...small, colour: 'green' });
    for (const [index, line] of pen.wrap(title, textWidth - 50, label).entries()) {
      if (index > 0) pen.space(11);
      pen.text(line, 50, 0, label);
    }
    pen.paragraph(text, 'second', 50);
    if (answer !== null) pen.paragraph(answer, 'ink', 50);
  }
}
