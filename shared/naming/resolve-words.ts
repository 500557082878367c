import type { InstrumentGroup, NamingRules } from '../rules/naming-rules.ts';
import type { FileRole } from '../session/session-information.ts';
import { chooseHead, instrumentMeanings, type Head } from './choose-head.ts';
import type { ExportMark } from './export-marks.ts';
import type { Instrument, Lexicon, Meaning } from './lexicon.ts';
import type { LeftoverKind, NameSpan, NameSpanKind, ParsedName, Side } from './parsed-name.ts';
import type { FolderHint } from './read-folder.ts';
import type { Word } from './read-words.ts';
import type { Range } from './split-name.ts';

/** Where the running number stands, if not in front: start of its word in the name. */
export type NameFrame = { numberStart: number | null };

export type ResolveContext = {
  name: string;
  naming: NamingRules;
  lexicon: Lexicon;
  folder: FolderHint;
};

/** Ordinals above this are something else: a model of microphone, a year. */
const highestOrdinal = 32;
const highestNumber = 9999;

type RoleChoice = { role: FileRole; sure: boolean };

function chooseRole(words: readonly Word[], head: Head | null): RoleChoice | null {
  const found = words.flatMap((word) => word.meanings.filter((m) => m.kind === 'role'));
  const guide = found.find((meaning) => meaning.role === 'guide');
  if (guide) return { role: 'guide', sure: guide.sure };
  if (head?.instrument.written === 'Click') return { role: 'click', sure: head.sure };
  const sure = found.find((meaning) => meaning.sure);
  if (sure && !head?.sure) return { role: sure.role, sure: true };
  const first = found[0];
  return first && !head ? { role: first.role, sure: false } : null;
}

/** Letters that mean a side only where something stands before them and nothing after. */
const lateSides: ReadonlySet<Side> = new Set(['C', 'M', 'S', 'stereo']);

class NameReader {
  readonly parsed: ParsedName;
  private last: 'nothing' | 'instrument' | 'detail' | 'side' | 'unknown' | 'take' | LeftoverKind =
    'nothing';
  private strangers = 0;
  private guessed = false;

  constructor(
    private readonly words: readonly Word[],
    private readonly context: ResolveContext,
    private readonly frame: NameFrame,
    private readonly head: Head | null,
    private readonly role: RoleChoice | null,
  ) {
    this.parsed = {
      number: null,
      groupId: null,
      nature: null,
      instrument: null,
      misspelt: false,
      ordinal: null,
      detail: [],
      side: null,
      take: null,
      counter: null,
      role: role?.role ?? 'track',
      leftovers: [],
      confidence: 'unknown',
      spans: [],
    };
  }

  read(): ParsedName {
    this.words.forEach((word, index) => {
      if (word.digits !== null) this.readDigits(word, word.digits, index);
      else this.readWord(word, index);
    });
    this.nameInstrument();
    return this.parsed;
  }

  private nameInstrument(): void {
    const { parsed, head, role } = this;
    const folder = this.context.folder.instrument;
    // A word that often means something else, among words that are not known at all.
    const far = head !== null && !head.plain && this.strangers >= 2;
    const own = far ? null : (head?.instrument ?? null);
    const instrument = own ?? (role === null ? folder : null);
    if (instrument) {
      const group = this.context.lexicon.groupOf(instrument);
      parsed.instrument = instrument.written;
      parsed.groupId = group?.id ?? null;
      parsed.nature = group?.nature ?? instrument.nature;
      const sure = head?.sure === true && !this.guessed && this.strangers <= 1;
      parsed.confidence = sure ? 'certain' : 'guess';
    } else {
      // Which of several alike it is says nothing where nobody knows of what.
      parsed.ordinal = null;
      if (role) parsed.confidence = role.sure ? 'certain' : 'guess';
    }
  }

  private span(kind: NameSpanKind, range: Range): void {
    const { start, end } = range;
    this.parsed.spans.push({ kind, text: this.context.name.slice(start, end), start, end });
  }

  private leftOver(kind: LeftoverKind, word: Word): void {
    const previous = this.parsed.leftovers.at(-1);
    const joins =
      previous?.kind === kind &&
      this.last === kind &&
      (kind !== 'unknown' || previous.end === word.start);
    if (joins) {
      const text = this.context.name.slice(previous.start, word.end);
      const longer = { kind, text, start: previous.start, end: word.end };
      this.parsed.leftovers[this.parsed.leftovers.length - 1] = longer;
      this.parsed.spans[this.parsed.spans.length - 1] = { ...longer };
    } else {
      const { start, end, text } = word;
      this.parsed.leftovers.push({ kind, text, start, end });
      this.span(kind, word);
      if (kind === 'unknown' && word.to - word.from > 1) this.strangers++;
    }
    this.last = kind;
  }

  private addDetail(written: string, range: Range | null): void {
    if (!this.parsed.detail.includes(written)) this.parsed.detail.push(written);
    if (range) this.span('detail', range);
    this.last = 'detail';
  }

  /** Whether nothing but leftovers and digits follows. */
  private endsName(index: number): boolean {
    return this.words
      .slice(index + 1)
      .every((word) => word.digits !== null || word.meanings.some((m) => m.kind === 'leftover'));
  }

  private readDigits(word: Word, value: number, index: number): void {
    const { parsed, frame } = this;
    if (word.start === frame.numberStart) {
      parsed.number = value;
      this.span('number', word);
      return;
    }
    const before = this.words[index - 1];
    if (this.last === 'take' && parsed.take === null) {
      parsed.take = value;
      this.span('take', word);
      return;
    }
    if (before && ['export-word', 'copy', 'version'].includes(this.last) && this.isNextTo(before)) {
      if (this.last === 'copy') parsed.counter = value;
      this.leftOver(this.last as LeftoverKind, word);
      this.last = 'nothing';
      return;
    }
    const numbered = frame.numberStart === null && value <= highestNumber;
    if (index === 0 && this.words.length > 1 && numbered) {
      parsed.number = value;
      this.span('number', word);
      return;
    }
    if (this.isCounter(word, before, index)) {
      parsed.counter = value;
      this.leftOver('counter', word);
      return;
    }
    this.readOrdinal(word, value);
  }

  private isNextTo(before: Word): boolean {
    const previous = this.parsed.leftovers.at(-1);
    return previous !== undefined && previous.end === before.end;
  }

  private isCounter(word: Word, before: Word | undefined, index: number): boolean {
    if (!before || !this.endsName(index)) return false;
    const between = this.context.name.slice(before.end, word.start);
    const padded = word.text.startsWith('0');
    if (between === this.context.naming.separator && !padded) return false;
    return /^\.+$/.test(between) || (/^[-_]+$/.test(between) && word.end - word.start >= 2);
  }

  private readOrdinal(word: Word, value: number): void {
    const { parsed } = this;
    const fits = value >= 1 && value <= highestOrdinal;
    const detail = parsed.detail.at(-1);
    if (fits && this.last === 'detail' && detail !== undefined && !/\d$/.test(detail)) {
      parsed.detail[parsed.detail.length - 1] = `${detail} ${value}`;
      this.span('detail', word);
    } else if (fits && parsed.ordinal === null && this.last !== 'nothing') {
      parsed.ordinal = value;
      this.span(this.last === 'instrument' ? 'ordinal' : 'detail', word);
    } else {
      this.leftOver('unknown', word);
    }
  }

  private readWord(word: Word, index: number): void {
    if (word.doubtful) this.guessed = true;
    if (this.head?.indexes.has(index)) this.readInstrument(word, this.head.instrument);
    else if (!this.readRole(word) && !this.readOther(word, index)) this.leftOver('unknown', word);
  }

  private readInstrument(word: Word, instrument: Instrument): void {
    this.span('instrument', word);
    const meaning = instrumentMeanings(word).find((m) => m.instrument === instrument);
    if (meaning?.standing === 'misspelt') this.parsed.misspelt = true;
    if (meaning && meaning.adds !== null) this.addDetail(meaning.adds, null);
    this.last = 'instrument';
  }

  private readRole(word: Word): boolean {
    const { role, head } = this;
    const meaning = word.meanings.find((m) => m.kind === 'role' && m.role === role?.role);
    if (!meaning) return false;
    if (role?.role === 'guide' && head) this.addDetail('Guide', word);
    else this.span('role', word);
    return true;
  }

  private readOther(word: Word, index: number): boolean {
    const detail = word.meanings.find((m) => m.kind === 'detail');
    const side = word.meanings.find((m) => m.kind === 'side');
    const describing = instrumentMeanings(word).find((m) => m.instrument.detail !== null);
    const leftover = word.meanings.find((m) => m.kind === 'leftover');
    // `Ch 3` in front is a channel; behind a voice, Ch is its chorus.
    const counted = this.last === 'nothing' && this.words[index + 1]?.digits != null;
    if (leftover && counted) {
      this.leftOver(leftover.leftover, word);
      return true;
    }
    if (side && this.readSide(word, side.side, index)) return true;
    if (detail) this.addDetail(detail.detail.written, word);
    else if (describing?.instrument.detail) {
      if (describing.standing === 'unsure') this.guessed = true;
      this.addDetail(describing.instrument.detail, word);
    } else if (this.readTake(word, index)) return true;
    else if (this.readRoman(word)) return true;
    else if (leftover) this.leftOver(leftover.leftover, word);
    else return false;
    return true;
  }

  private readSide(word: Word, side: Side, index: number): boolean {
    if (this.parsed.side !== null) return false;
    const short = word.to - word.from <= 2;
    const { tokens } = this.context.naming;
    const anywhere = tokens.includes('side') && tokens.at(-1) !== 'side';
    const something = this.last !== 'nothing' || anywhere;
    const late = anywhere || (something && this.endsName(index));
    if (lateSides.has(side)) {
      if (!late && !(something && !short && side === 'stereo')) return false;

      if (short && side !== 'stereo') this.guessed = true;
    } else if (short && !something) {
      if (this.words.length === 1) return false;
      this.guessed = true;
    }
    this.parsed.side = side;
    this.span('side', word);
    this.last = 'side';
    return true;
  }

  private readTake(word: Word, index: number): boolean {
    const follows = this.words[index + 1]?.digits ?? null;
    const named = word.meanings.some((m: Meaning) => m.kind === 'take');
    const letter = word.text.toLowerCase() === 't' && this.head !== null && this.last !== 'nothing';
    if (!named && !(letter && follows !== null)) return false;
    this.span('take', word);
    this.last = 'take';
    return true;
  }

  /** `Violin II`, `2nd Vox`. */
  private readRoman(word: Word): boolean {
    const ordinal = word.meanings.find((m) => m.kind === 'ordinal');
    if (!ordinal || this.parsed.ordinal !== null) return false;
    const roman = /^[IV]+$/.test(word.text);
    if (roman ? this.last !== 'instrument' : word.text.length < 3) return false;
    this.parsed.ordinal = ordinal.value;
    this.span(this.last === 'instrument' ? 'ordinal' : 'detail', word);
    return true;
  }
}

function onlySongWords(parsed: ParsedName): boolean {
  return (
    parsed.leftovers.some(({ kind }) => kind === 'title') &&
    parsed.leftovers.every(({ kind }) => kind !== 'unknown') &&
    parsed.detail.length === 0
  );
}

/** Puts the words of a name together: which is the instrument, and what the others say about it. */
export function resolveWords(
  words: readonly Word[],
  marks: readonly ExportMark[],
  context: ResolveContext,
  frame: NameFrame,
  group: { group: InstrumentGroup; range: Range } | null,
): ParsedName {
  const head = chooseHead(words, context.folder.instrument?.nature ?? null);
  const role = chooseRole(words, head);
  const replaced = role?.sure && role.role !== 'guide' && role.role !== 'click';
  const parsed = new NameReader(words, context, frame, replaced ? null : head, role).read();
  for (const { counter, ...mark } of marks) {
    parsed.leftovers.push(mark);
    parsed.spans.push({ ...mark });
    if (counter !== null) parsed.counter ??= counter;
  }
  if (group) {
    const { start, end } = group.range;
    parsed.spans.push({ kind: 'group', text: context.name.slice(start, end), start, end });
  }
  const inOrder = (a: NameSpan | Range, b: NameSpan | Range) => a.start - b.start;
  parsed.spans.sort(inOrder);
  parsed.leftovers.sort(inOrder);
  if (parsed.confidence === 'unknown' && onlySongWords(parsed)) {
    return { ...parsed, role: 'rough-mix', confidence: 'guess' };
  }
  return parsed;
}
