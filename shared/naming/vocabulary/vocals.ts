import type { InstrumentEntry } from './entry.ts';

/** Every way to write the bare word. */
const vocal =
  '(vox|voc|vocal|vocals|voice|voices|vx|vcl|vo|gesang|stimme|voix|voz|voce|vocs|vocl|chant|vocale)';

export const vocals: readonly InstrumentEntry[] = [
  {
    written: 'Lead Vocal',
    short: 'LV',
    forms: `(lead|ld|main|haupt|principal) ${vocal}, ${vocal} (lead|ld|main|principal|principale|solista),
      lv, lvs, lead v, ldv, ldvx, haupt stimme, haupt gesang, lead gesang, lead singer,
      solo ${vocal}, voz cantante, prima voce, lead sung`,
    misspelt: `lead (vocla|voacl|vocl|vovals|vocasl), (laed|led|leed) ${vocal}`,
    unsure: `lead, leads, main, ld, lead main, lead line, lvox, lvoc, lvocal`,
  },
  {
    written: 'Backing Vocal',
    short: 'BV',
    forms: `(backing|back|backings|background|backgrounds|bg|bgd|bk|bkg|bkgd|bck|bkng|backup|back up|b)
      ${vocal}, ${vocal} (backing|bg|back|background|bkg|bgs), bv, bvs, bgv, bgvs, b v, bv x, bgvx, bgvox, backings, backgrounds, coros, cori, choeurs, choeur, coristas, backup singer, backup singers,
      backing singer, backing choir, bg gesang, background gesang, backgrounds gesang, hintergrund gesang,
      chor gesang`,
    misspelt: 'backing (vocla|voacl|vocasl), baking vocals, bakcing vocals, backin vox',
    unsure:
      'bg, bgs, bkg, bck, background, backs, bks, backing, ooh +Ooh, oohs +Ooh, aah +Aah, aahs +Aah, ahs +Aah, ahhs +Aah',
  },
  {
    written: 'Gang Vocal',
    short: 'Gang',
    forms: `gang, gangs, gang ${vocal}, ${vocal} gang, group ${vocal}, crowd ${vocal}, gang shouts, gang shout +Shout, shouts`,
    unsure: 'crew',
  },
  {
    written: 'Harmony',
    short: 'Harm',
    forms: `harmony, harmonies, harm, harms, hrm, hrmy, harmo, zweit stimme, zweite stimme, segunda voz,
      seconda voce, deuxieme voix, second voice, 2nd voice, 2nd vox, second vox,
      oberstimme +High, unterstimme +Low`,
    misspelt: 'hamony, harmoney, haromny, harmonys',
    unsure: 'hmy, hrms',
    detail: 'Harmony',
  },
  {
    written: 'Ad Lib',
    short: 'AdLb',
    forms: 'ad lib, ad libs, ad lb, adl, ad libz, improv',
    misspelt: 'addlib, adlip, add libs',
    unsure: 'ads',
    detail: 'Ad Lib',
  },
  {
    written: 'Choir',
    short: 'Choi',
    forms: 'choir, choi, chorale, coral, gospel choir, childrens choir, choirs',
    misspelt: 'chior, coir',
    unsure: 'chor, coro',
    detail: 'Choir',
  },
  {
    written: 'Rap',
    short: 'Rap',
    forms: `rap, raps, rap ${vocal}, ${vocal} rap, rapper, rapping`,
    detail: 'Rap',
  },
  {
    written: 'Spoken Word',
    short: 'Spkn',
    forms: `spoken word, spoken, speech, spkn, narration, narrator, dialogue, dialog, talking, sprache, sprecher, spoken ${vocal}`,
    unsure: 'speak, talk',
    detail: 'Spoken',
  },
  {
    written: 'Whisper',
    short: 'Whsp',
    forms: `whisper, whispers, whisp, whsp, whispered, ${vocal} whisper, gefluester`,
    detail: 'Whisper',
  },
  { written: 'Beatbox', short: 'BBox', forms: 'beat box, b box, beat boxing', unsure: 'bbx' },
  {
    written: 'Vocal Chop',
    short: 'VChp',
    forms: `${vocal} (chop|chops|chp), chopped ${vocal}, v chp, chop ${vocal}`,
    unsure: 'chop, chops',
  },
  {
    written: 'Vocoder',
    short: 'Vcdr',
    forms: `vocoder, vcdr, vocoded ${vocal}, ${vocal} vocoder, vocoder ${vocal}`,
    detail: 'Vocoder',
  },
  {
    written: 'Vocal',
    short: 'Vox',
    forms: `${vocal}, voxs, voxes, vocalist, vocalists, vocales, voces, voci, stimmen, singer, singing, sung`,
    misspelt: 'vocla, voacl, vocasl, vovals, vocls, volca, vxo',
    unsure:
      'scream +Scream, screams +Scream, screamer +Scream, acapella, a cappella, a capella, acappella, vcs',
    general: true,
  },
];
