import type { FileRole } from '../../session/session-information.ts';
import type { LeftoverKind, Side } from '../parsed-name.ts';

/** Words for a side in full, and letters that only mean a side at the end or after an instrument. */
export const sideWords: Readonly<Record<Side, string>> = {
  L: 'left, l, lft, lf, lt, links, linke, gauche, izq, izquierda, izda, sinistra, sinistro, sx, esquerda',
  R: 'right, r, rgt, rght, rt, rechts, rechte, droite, derecha, der, dcha, destra, destro, dx, direita',
  C: 'center, centre, c, ctr, cntr',
  M: 'm, mid side mid, ms mid, ms m',
  S: 's, side, mid side side, ms side, ms s',
  stereo: 'stereo, st, ster, sto, stereofonico, l r, lr',
};

/** Words that alone make a file something else than a track of the song; `sure` or not. */
export const roleWords: readonly { role: FileRole; sure: boolean; forms: string }[] = [
  {
    role: 'rough-mix',
    sure: true,
    forms: `rough mix, rough, r mix, rough bounce, roughs, rough mixdown, monitor mix, board mix, working mix, work mix,
      roh mix, rohmix, vormischung, mix rough, mix provisional, mezcla provisional, pre mix, mix down, mixdown,
      reference mix, ref mix, mix ref, mix reference`,
  },
  {
    role: 'rough-mix',
    sure: false,
    forms: `mix, full mix, 2 mix, two mix, 2 track, two track, master, mastered, mstr, mix print, print,
      stereo mix, demo, demo mix, maqueta, maquette, provino, instrumental, inst, instr, tv mix, tv track, playback, mezcla,
      main mix, main out, backing track, backing tracks, mix bus, 2 bus, stereo out, master out, premaster, pre master, minus one`,
  },
  {
    role: 'reference',
    sure: true,
    forms:
      'reference, ref, refs, references, referenz, reference track, ref track, reference song, ref song, referencia, riferimento',
  },
  {
    role: 'guide',
    sure: true,
    forms: `guide, guide track, scratch, scratch track, pilot, pilotspur, pilot track, guia, guida,
      guide mix, temoin, voix temoin, placeholder`,
  },
];

/** Followed by a number they say which take it is. */
export const takeWords = 'take, tk, tke, prise, toma, takes';

/** What recording programs, file managers and habits add to a name without saying anything. */
export const leftoverWords: Readonly<Partial<Record<LeftoverKind, string>>> = {
  copy: 'copy, kopie, copie, copia, duplicate, dup, dupl, duplicated, cpy',
  'export-word': `track, trk, tr, trak, spur, piste, pista, audio, aud, audio track, channel, chan, canal, kanal,
    ch, file, region, clip, untitled, unnamed, unbenannt, sans titre, sin titulo, consolidated, consolidate, consol, cons, bounce,
    bounced, bnc, bip, bounced in place, bounce in place, render, rendered, rendering, renders, export,
    exported, exports, freeze, frozen, merged, merge, glued, normalized, normalised, norm, voice memo, voice memos, memo, flattened, flatten, flat, rec, recording,
    recorded, record, stem, stems, multitrack, multitracks, multi track, wav, wave, aif, aiff,
    session, project, output, inst track, midi, instrument track, from zero, from start`,
  version: `final, finale, finals, finished, final version, new, neu, nuevo, nueva, nouveau, nuovo,
    old, alt version, latest, updated, update, upd, fixed, fix, edit, edited, edits, ed, cleaned, cleaned up,
    tmp, temp, test, use this, use this one, version, ver, rev version, revised, good, keep, keeper, best`,
};
